import { type IngestLimits, ROTOR_LIMITS } from '@/lib/ingest/limits';
import { type Problem } from '@/lib/ingest/problem';
import { ProblemLog } from '@/lib/ingest/problem-log';
import { ROTOR_COLUMNS, type RotorColumn, readRotor } from '@/lib/ingest/rotors/rotor-row';
import { Cells } from '@/lib/ingest/table/cells';
import { type ColumnMapping, readHeader } from '@/lib/ingest/table/header';
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

  await readTable(bytes, limits, log, {
    header(record, delimiter) {
      const header = readHeader(
        record,
        {
          columns: ROTOR_COLUMNS,
          needed: ['rotor', 'polar_inertia', 'sense'],
          mapping,
          maxColumns: limits.columns,
        },
        log,
      );
      if (header === null || !axisStands(header.positions, header.line, log)) return false;
      cells = new Cells(header, log, { decimalComma: delimiter === ';', fieldLength: limits.fieldLength });
      return true;
    },
    row(record) {
      if (cells === null || !cells.load(record)) return;
      const rotor = readRotor(cells, FACTORS[inertiaUnit], () => log.total);
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
  const read = cells as Cells<RotorColumn> | null;
  read?.finish();
  return {
    rotors,
    problems: log.problems(),
    problemCounts: log.counts(),
    unknownColumns: read === null ? [] : read.header.own.map(({ name }) => name),
  };
}

/** A file gives its axes as arrows, as angles, or some rows so and some so. */
function axisStands(positions: ReadonlyMap<RotorColumn, number>, line: number, log: ProblemLog): boolean {
  const arrow = (['axis_x', 'axis_y', 'axis_z'] as const).filter((column) => positions.has(column)).length;
  const angles = (['axis_yaw', 'axis_pitch'] as const).filter((column) => positions.has(column)).length;
  if ((arrow === 3 || arrow === 0) && (angles === 2 || angles === 0) && arrow + angles > 0) return true;
  const message =
    'A shaft needs axis_x, axis_y and axis_z, or axis_yaw and axis_pitch. Add the missing columns.';
  log.add({ kind: 'missing-column', line, column: arrow > 0 ? 'axis_x' : 'axis_yaw', found: null, message });
  return false;
}
