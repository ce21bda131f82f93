import { type LimitQuantity, type LimitSense } from '@/lib/loading/limits';
import { type Maturity } from '@/lib/mass/component';

/** What the settings' codes are called on screens. */
export const BUILD_WORDS = {
  design: 'Design',
  'as-built': 'As built',
  'as-weighed': 'As weighed',
} as const;

export const LIMIT_QUANTITY_WORDS: Readonly<Record<LimitQuantity, string>> = {
  mass: 'Mass',
  percentMac: 'CG, % MAC',
  cgx: 'CG x, from the datum',
  cgy: 'CG y, from the datum',
  cgz: 'CG z, from the datum',
  ixx: 'Ixx about the CG',
  iyy: 'Iyy about the CG',
  izz: 'Izz about the CG',
  ixy: 'Product Ixy, positive integral',
  ixz: 'Product Ixz, positive integral',
  iyz: 'Product Iyz, positive integral',
};

export const LIMIT_SENSE_WORDS: Readonly<Record<LimitSense, string>> = {
  'at-least': 'at least',
  'at-most': 'at most',
};

export const LIMIT_KIND_WORDS = {
  contract: 'Contract',
  specification: 'Specification',
  target: 'Target',
  allocation: 'Allocation',
} as const;

export const MATURITY_WORDS: Readonly<Record<Maturity, string>> = {
  E: 'E, estimated',
  C: 'C, calculated',
  A: 'A, actual (weighed)',
};
