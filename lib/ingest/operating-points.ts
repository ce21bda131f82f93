import { type IngestLimits, ROTOR_LIMITS } from '@/lib/ingest/limits';
import { type Problem } from '@/lib/ingest/problem';
import { ProblemLog } from '@/lib/ingest/problem-log';
import { Cells } from '@/lib/ingest/table/cells';
import { type ColumnMapping, readHeader } from '@/lib/ingest/table/header';
import { readTable } from '@/lib/ingest/table/read-table';
import { type OperatingPoint, type ShaftSpeed } from '@/lib/rotors/rotor';
import { radiansPerSecond } from '@/lib/units/convert';

/** The columns of a table of operating points, one row for a shaft at a point. */
export type PointColumn = 'point' | 'title' | 'shaft' | 'rpm' | 'rpm_sigma';
export const POINT_COLUMNS: readonly PointColumn[] = ['point', 'title', 'shaft', 'rpm', 'rpm_sigma'];

export interface PointsReading {
  readonly points: readonly OperatingPoint[];
  readonly problems: readonly Problem[];
  readonly problemCounts: Readonly<Record<string, number>>;
  readonly unknownColumns: readonly string[];
}

export interface PointsOptions {
  readonly limits?: IngestLimits;
  readonly mapping?: ColumnMapping<PointColumn>;
}

interface Draft {
  title: string | null;
  readonly speeds: Map<string, { readonly line: number; readonly speed: ShaftSpeed }>;
}

/**
 * Reads operating points: a row gives the speed of one shaft at one point in revolutions per minute (negative turns the other way),
 * `rpm_sigma` one standard deviation. Points stand in the order of the file, speeds in rad/s. Right when `problems` is empty.
 */
export async function readOperatingPoints(
  bytes: AsyncIterable<Uint8Array>,
  { limits = ROTOR_LIMITS, mapping = {} }: PointsOptions = {},
): Promise<PointsReading> {
  const log = new ProblemLog();
  const drafts = new Map<string, Draft>();
  let cells: Cells<PointColumn> | null = null;
  let unknownColumns: readonly string[] = [];

  await readTable(bytes, limits, log, {
    header(record, delimiter) {
      const needed: readonly PointColumn[] = ['point', 'shaft', 'rpm'];
      const { columns: maxColumns, fieldLength } = limits;
      const contract = { columns: POINT_COLUMNS, needed, mapping, maxColumns, check: () => undefined };
      const header = readHeader(record, contract, log);
      unknownColumns = header.own.map(({ name }) => name);
      cells = new Cells(header, log, { decimalComma: delimiter === ';', fieldLength });
      return log.total === 0;
    },
    row(record) {
      if (cells !== null && cells.load(record)) readRow(cells, drafts);
    },
  });
  (cells as Cells<PointColumn> | null)?.finish();
  return {
    points: Array.from(drafts, ([code, { title, speeds }]) => ({
      code,
      title: title ?? code,
      speeds: Array.from(speeds.values(), ({ speed }) => speed),
    })),
    problems: log.problems(),
    problemCounts: log.counts(),
    unknownColumns,
  };
}

function readRow(cells: Cells<PointColumn>, drafts: Map<string, Draft>): void {
  const code = cells.neededText('point');
  const shaft = cells.neededText('shaft');
  const rpm = cells.neededNumber('rpm');
  const sigma = cells.number('rpm_sigma');
  if (sigma !== null && sigma !== undefined && sigma < 0) {
    const message = `${cells.quoted('rpm_sigma')} is negative. An uncertainty is zero or more.`;
    cells.problem('negative-sigma', 'rpm_sigma', message);
  }
  if (code === null || shaft === null || rpm === undefined || sigma === undefined) return;
  const draft = drafts.get(code) ?? { title: null, speeds: new Map() };
  drafts.set(code, draft);

  const title = cells.text('title');
  if (title !== null && draft.title !== null && title !== draft.title) {
    const message = `The point ${code} is called \`${draft.title}\` above. Give it one title, or leave the others blank.`;
    cells.problem('different-title', 'title', message);
  }
  draft.title ??= title;
  const earlier = draft.speeds.get(shaft);
  if (earlier !== undefined) {
    const message = `The point ${code} has a speed for the shaft \`${shaft}\` in line ${earlier.line}. Keep one of them.`;
    cells.problem('duplicate-speed', 'shaft', message);
    return;
  }
  const speed = {
    shaft,
    speed: radiansPerSecond(rpm),
    sigma: sigma === null ? null : radiansPerSecond(sigma),
  };
  draft.speeds.set(shaft, { line: cells.line, speed });
}
