import { type OperatingPoint } from '@/lib/rotors/rotor';
import { rpm } from '@/lib/units/convert';

/** What a person has changed in the grid of operating points, and nothing else. */
export interface PointEdits {
  /** Point code -> `title`, `rpm SHAFT` or `sigma SHAFT` -> text typed. */
  readonly cells: Readonly<Record<string, Readonly<Record<string, string>>>>;
  readonly added: readonly string[];
  readonly removed: readonly string[];
}

export const NO_EDITS: PointEdits = { cells: {}, added: [], removed: [] };

/** A line of the grid as it is shown and sent: texts, '' where there is none. */
export interface GridPoint {
  readonly code: string;
  readonly title: string;
  readonly speeds: readonly { readonly shaft: string; readonly rpm: string; readonly sigma: string }[];
}

/** rad/s as rpm with the digits it was typed with. */
export const rpmText = (speed: number): string => String(Number(rpm(speed).toPrecision(15)));

/** The points of a revision with a person's edits laid over them. Speeds of shafts without a rotor stay where they are. */
export function asGrid(
  points: readonly OperatingPoint[],
  edits: PointEdits,
  shafts: readonly string[],
): GridPoint[] {
  const known = points.filter(({ code }) => !edits.removed.includes(code));
  const added = edits.added
    .filter((code) => !known.some((point) => point.code === code))
    .map((code): OperatingPoint => ({ code, title: '', speeds: [] }));
  return [...known, ...added].map(({ code, title, speeds }) => {
    const typed = edits.cells[code] ?? {};
    return {
      code,
      title: typed['title'] ?? title,
      speeds: shafts.map((shaft) => {
        const stands = speeds.find((one) => one.shaft === shaft);
        const sigma = stands?.sigma ?? null;
        return {
          shaft,
          rpm: typed[`rpm ${shaft}`] ?? (stands ? rpmText(stands.speed) : ''),
          sigma: typed[`sigma ${shaft}`] ?? (sigma === null ? '' : rpmText(sigma)),
        };
      }),
    };
  });
}

/** Every shaft that a rotor hangs on or a point gives a speed for, in the order in which they come. */
export function shaftsOf(
  rotors: readonly { readonly shaft: string }[],
  points: readonly OperatingPoint[],
): string[] {
  return [
    ...new Set([
      ...rotors.map(({ shaft }) => shaft),
      ...points.flatMap(({ speeds }) => speeds.map(({ shaft }) => shaft)),
    ]),
  ];
}
