import { type AirframeVec } from '@/lib/frames/tags';
import { type Bounds, type Range } from '@/lib/three-views/bounds';
import { onSheet, type SheetAxis, type ViewAxes, viewAxes, type ViewName } from '@/lib/three-views/views';
import { type AxisTriple } from '@/lib/frames/axes';

/** One view as it lies on the screen: metres from its upper left corner, and shares of its width and height. */
export interface Sheet {
  readonly view: ViewName;
  readonly axes: ViewAxes;
  /** m */
  readonly width: number;
  readonly height: number;
  /** From the upper left corner, m. */
  readonly at: (place: AirframeVec) => { readonly x: number; readonly y: number };
  /** In per cent of the width and of the height. */
  readonly percent: (place: AirframeVec) => { readonly x: number; readonly y: number };
  /** Shares (0 to 1) of width and height -> metres to the right and upwards, as regions are drawn in. */
  readonly metres: (shareX: number, shareY: number) => readonly [number, number];
}

const alongSheet = ([low, high]: Range, { sign }: SheetAxis): Range =>
  sign > 0 ? [low, high] : [-high, -low];

export function sheetOf(view: ViewName, triple: AxisTriple, bounds: Bounds): Sheet {
  const axes = viewAxes(view, triple);
  const [left, right] = alongSheet(bounds[axes.across.index], axes.across);
  const [bottom, top] = alongSheet(bounds[axes.upward.index], axes.upward);
  const [width, height] = [right - left, top - bottom];
  const at: Sheet['at'] = (place) => {
    const [u, v] = onSheet(place, axes);
    return { x: u - left, y: top - v };
  };
  return {
    view,
    axes,
    width,
    height,
    at,
    percent: (place) => {
      const { x, y } = at(place);
      return { x: (100 * x) / width, y: (100 * y) / height };
    },
    metres: (shareX, shareY) => [left + shareX * width, top - shareY * height],
  };
}
