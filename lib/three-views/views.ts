import { type AxisTriple, type Direction, arrow } from '@/lib/frames/axes';
import { type AirframeVec } from '@/lib/frames/tags';

export type ViewName = 'side' | 'plan' | 'front';
export const VIEW_NAMES: readonly ViewName[] = ['side', 'plan', 'front'];

/** What lies to the right of the sheet and what up it. The third direction points at the reader. */
export const SHEET: Readonly<
  Record<ViewName, { readonly across: Direction; readonly upward: Direction; readonly from: string }>
> = {
  side: { across: 'aft', upward: 'up', from: 'from the left' },
  plan: { across: 'aft', upward: 'right', from: 'from above' },
  front: { across: 'left', upward: 'up', from: 'from ahead' },
};

export const OPPOSITE: Readonly<Record<Direction, Direction>> = {
  aft: 'forward',
  forward: 'aft',
  right: 'left',
  left: 'right',
  up: 'down',
  down: 'up',
};

/** An airframe coordinate as it runs along an edge of the sheet: with it (1) or against it (-1). */
export interface SheetAxis {
  readonly index: 0 | 1 | 2;
  readonly sign: 1 | -1;
}

export interface ViewAxes {
  readonly across: SheetAxis;
  readonly upward: SheetAxis;
}

function sheetAxis(direction: Direction, axes: AxisTriple): SheetAxis {
  const along = arrow(direction, axes);
  const index = along[0] !== 0 ? 0 : along[1] !== 0 ? 1 : 2;
  return { index, sign: along[index] > 0 ? 1 : -1 };
}

/** How a view lays the airframe's coordinates on the sheet, for any three axis words and either handedness. */
export function viewAxes(view: ViewName, axes: AxisTriple): ViewAxes {
  const { across, upward } = SHEET[view];
  return { across: sheetAxis(across, axes), upward: sheetAxis(upward, axes) };
}

/** A place from the datum (m) on a sheet: to the right and upwards, m. */
export function onSheet(place: AirframeVec, { across, upward }: ViewAxes): readonly [number, number] {
  return [across.sign * place[across.index], upward.sign * place[upward.index]];
}
