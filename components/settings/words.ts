import { type Maturity } from '@/lib/mass/component';

/** What the settings' codes are called on screens. */
export const BUILD_WORDS = {
  design: 'Design',
  'as-built': 'As built',
  'as-weighed': 'As weighed',
} as const;

export const LIMIT_WORDS = {
  'cg-forward-percent-mac': 'CG, forward limit',
  'cg-aft-percent-mac': 'CG, aft limit',
  'mass-maximum': 'Maximum mass',
} as const;

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
