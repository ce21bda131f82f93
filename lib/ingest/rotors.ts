import { type IngestLimits, ROTOR_LIMITS } from '@/lib/ingest/limits';
import { type Problem } from '@/lib/ingest/problem';
import { ProblemLog } from '@/lib/ingest/problem-log';
import { ROTOR_COLUMNS, type RotorColumn, readRotor } from '@/lib/ingest/rotor-row';
import { Cells } from '@/lib/ingest/table/cells';
import { type ColumnMapping, type HeaderProblem, readHeader } from '@/lib/ingest/table/header';
import { readTable } from '@/lib/ingest/table/read-table';
import { type Rotor } from '@/lib/rotors/rotor';
import { FACTORS, type InertiaUnit } from '@/lib/units/table';

export interface RotorsReading {
  readonly rotors: readonly Rotor[];
  readonly problems: readonly Problem[];
  readonly problemCounts: Readonly<Record<string, number>>;
  readonly unknownColumns: readonly string[];
}

export interface RotorsOptions {
  readonly limits?: IngestLimits;
  readonly mapping?: ColumnMapping<RotorColumn>;
}

/**
 * Reads a file of rotating parts (contract section 2) into SI: kg.m2, rad. `polar_inertia_sigma` is one standard deviation.
 * Right when `problems` is empty. Throws a RangeError for an unknown unit; errors of the byte stream pass through.
 */
export async function readRotors(
  bytes: AsyncIterable<Uint8Array>,
  { inertiaUnit }: { readonly inertiaUnit: InertiaUnit },
  { limits = ROTOR_LIMITS, mapping = {} }: RotorsOptions = {},
): Promise<RotorsReading> {
  if (!Object.hasOwn(FACTORS, inertiaUnit)) {
    throw new RangeError(`The file declares no inertia_unit that is known: ${String(inertiaUnit)}.`);
  }
  const log = new ProblemLog();
  const rotors: Rotor[] = [];
  const lines = new Map<string, number>();
  let cells: Cells<RotorColumn> | null = null;
  let unknownColumns: readonly string[] = [];

  await readTable(bytes, limits, log, {
    header(record, delimiter) {
      const needed: readonly RotorColumn[] = ['rotor', 'polar_inertia', 'sense'];
      const { columns: maxColumns, fieldLength } = limits;
      const contract = { columns: ROTOR_COLUMNS, needed, mapping, maxColumns, check: checkAxis };
      const header = readHeader(record, contract, log);
      unknownColumns = header.own.map(({ name }) => name);
      cells = new Cells(header, log, { decimalComma: delimiter === ';', fieldLength });
      return log.total === 0;
    },
    row(record) {
      if (cells === null || !cells.load(record)) return;
      const rotor = readRotor(cells, FACTORS[inertiaUnit]);
      const name = cells.text('rotor');
      if (name === null) return;
      const earlier = lines.get(name);
      if (earlier !== undefined) {
        const message = `The rotor stands already in line ${earlier}. Give every rotor a name of its own.`;
        cells.problem('duplicate-rotor', 'rotor', message);
        return;
      }
      lines.set(name, record.line);
      if (rotor !== null) rotors.push(rotor);
    },
  });
  (cells as Cells<RotorColumn> | null)?.finish();
  return { rotors, problems: log.problems(), problemCounts: log.counts(), unknownColumns };
}

/** A file gives its axes as arrows, as angles, or some rows so and some so. */
function checkAxis(positions: ReadonlyMap<RotorColumn, number>, problem: HeaderProblem): void {
  const arrow = (['axis_x', 'axis_y', 'axis_z'] as const).filter((column) => positions.has(column)).length;
  const angles = (['axis_yaw', 'axis_pitch'] as const).filter((column) => positions.has(column)).length;
  if ((arrow === 3 || arrow === 0) && (angles === 2 || angles === 0) && arrow + angles > 0) return;
  const message =
    'A shaft needs axis_x, axis_y and axis_z, or axis_yaw and axis_pitch. Add the missing columns.';
  problem('missing-column', arrow > 0 ? 'axis_x' : 'axis_yaw', null, message);
}
