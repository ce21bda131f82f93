import { type HandoffDocument } from '@/lib/baselines/handoff-document';
import { type BaselineState } from '@/lib/baselines/states';
import { type CsvCell, csvLine } from '@/lib/export/csv';
import { type Moments } from '@/lib/frames/products';
import { type OutputUnits } from '@/lib/units/names';
import { type Unit } from '@/lib/units/table';

interface BaselineFile {
  /** With its numbers in `units`. */
  readonly document: HandoffDocument;
  readonly units: OutputUnits;
  readonly digest: string;
  readonly state: BaselineState;
}

/** As documents have it: a member that is not there is absent. */
type Condition = HandoffDocument['conditions'][number] &
  Properties & { readonly radiiOfGyration?: Xyz; readonly sigma?: Sigma };
type Column = readonly [name: string, cell: (condition: Condition) => CsvCell];

interface Xyz {
  readonly x: number;
  readonly y: number;
  readonly z: number;
}
interface Sigma {
  readonly mass: number;
  readonly cg: Xyz;
  readonly inertia: Moments;
  readonly massShare: number;
}
/** Of a condition: itself (basic), or with mass growth allowance (predicted). */
interface Properties {
  readonly cg?: { readonly airframe: Xyz; readonly percentMac?: number };
  readonly inertia?: Moments;
}

const XYZ = ['x', 'y', 'z'] as const;
const MOMENTS = ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const;

/**
 * The conditions of a signed baseline as CSV (RFC 4180, one header row), for spreadsheets and scripts that read no JSON. Each column
 * with a unit names it, each row its conventions, marking, digest and caution; what a condition does not have is empty.
 */
export function baselineCsv(file: BaselineFile): string {
  const columns = columnsOf(file);
  const rows = file.document.conditions.map((condition) => columns.map(([, cell]) => cell(condition)));
  return [columns.map(([name]) => name), ...rows].map(csvLine).join('');
}

function columnsOf({ document, units, digest, state }: BaselineFile): Column[] {
  const { conventions } = document;
  const mass = suffix(units.mass);
  const length = suffix(units.length);
  const inertia = suffix(units.inertia);
  const { x, y, z } = conventions.airframeAxes;
  const properties = (prefix: string, of: (condition: Condition) => Properties): Column[] => [
    ...xyz(`${prefix}cg_`, length, (condition) => of(condition).cg?.airframe),
    [`${prefix}cg_percent_mac`, (condition) => of(condition).cg?.percentMac ?? null],
    ...moments(prefix, inertia, (condition) => of(condition).inertia),
  ];
  return [
    ['condition', ({ code }) => code],
    ['title', ({ title }) => title],
    ['products', () => conventions.products],
    ['cg_axes', () => `airframe, from the datum; x ${x}, y ${y}, z ${z}`],
    ['inertia_axes', () => `body, ${conventions.bodyAxes}`],
    [`mass_${mass}`, (condition) => condition.mass],
    ...properties('', (condition) => condition),
    ...xyz('radius_of_gyration_', length, (condition) => condition.radiiOfGyration),
    [`sigma_mass_${mass}`, ({ sigma }) => sigma?.mass ?? null],
    ...xyz('sigma_cg_', length, ({ sigma }) => sigma?.cg),
    ...moments('sigma_', inertia, ({ sigma }) => sigma?.inertia),
    ['sigma_mass_share', ({ sigma }) => sigma?.massShare ?? null],
    [`predicted_mass_${mass}`, ({ predictedMass }) => predictedMass],
    ...properties('predicted_', ({ predicted }) => predicted),
    ['program', () => document.program],
    ['baseline', () => document.baseline],
    ['build', () => document.build],
    ['state', () => state],
    ['marking', () => document.marking],
    ['digest', () => digest],
    ['caution', () => document.caution],
  ];
}

const xyz = (name: string, unit: string, of: (condition: Condition) => Xyz | undefined): readonly Column[] =>
  XYZ.map((axis): Column => [`${name}${axis}_${unit}`, (condition) => of(condition)?.[axis] ?? null]);

const moments = (
  prefix: string,
  unit: string,
  of: (condition: Condition) => Moments | undefined,
): readonly Column[] =>
  MOMENTS.map((name): Column => [`${prefix}${name}_${unit}`, (condition) => of(condition)?.[name] ?? null]);

/** `kg.m2` at the end of a column's name. */
const suffix = (unit: Unit): string => unit.replaceAll('.', '_');
