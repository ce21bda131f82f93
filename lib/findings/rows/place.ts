import { type AirframeVec } from '@/lib/frames/tags';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { scaleVec } from '@/lib/numerics/vec3';
import { LENGTH_UNITS } from '@/lib/units/table';

import { TRAITS } from '../columns/traits';
import { type RowFacts } from '../row-facts';
import { type RowRule, type Watch, type WatchedList } from '../rule';
import { Book } from '../shared-books';
import { slipWords, unitSlips } from '../unit-slips';
import { FIRST_ROWS, Seen, counted, eachRow, eachWith, inUnit } from '../watch';

/**
 * How far a place is beyond the aircraft: 1 at the end of what can be part of it. The leading edge of the mean chord is part of
 * the aircraft, so nothing of it is farther fore or aft than the length; nor farther across than half the span; nor higher or lower than the
 * larger of the two, from the leading edge. Null where span, length or chord are not known.
 */
function beyondOf(geometry: AirframeGeometry | undefined): ((place: AirframeVec) => number) | null {
  if (geometry === undefined) return null;
  const { axes, span, length, mac, lemac, lateralPlane } = geometry;
  if (!(span > 0 && length > 0 && mac > 0)) return null;
  const extent = axes.map((direction) => {
    if (direction === 'left' || direction === 'right') return { from: lateralPlane, most: span / 2 };
    const most = direction === 'aft' || direction === 'forward' ? length : Math.max(span, length);
    return { from: null, most };
  });
  return (place) =>
    Math.max(
      ...extent.map(({ from, most }, k) => Math.abs((place[k] ?? NaN) - (from ?? lemac[k] ?? NaN)) / most),
    );
}

/** What both rules below ask of a row: how far beyond the aircraft it is, kept for the second to ask. */
class BeyondBook extends Book<number | null> {
  #beyond: ReturnType<typeof beyondOf> | undefined;

  protected take(row: RowFacts): number | null {
    if (!row.isCounted || row.component.mass === 0) return null;
    if (this.#beyond === undefined) this.#beyond = beyondOf(row.placement.geometry);
    return this.#beyond === null ? null : this.#beyond(row.place);
  }
}

/** At this many times the extent nothing can be part of the aircraft, however span and length were measured. */
const FAR = 2;
/** Probes, tip lights and stores reach a little beyond span and length. */
const NEAR = 1.05;

function placeWords(row: RowFacts): string {
  const { position } = row.component;
  const { lengthUnit } = row.declarations;
  const [x, y, z] = position.map((each) => inUnit(each, lengthUnit).split(' ')[0]);
  const beyond = beyondOf(row.placement.geometry);
  const slip = unitSlips(lengthUnit, LENGTH_UNITS).find(
    ({ factor }) => factor > 1 && beyond !== null && beyond(row.placeOf(scaleVec(1 / factor, position))) <= 1,
  );
  const looks = slip === undefined ? '' : `; the place looks ${slipWords(slip)}`;
  return `CG at ${x}, ${y}, ${z} ${lengthUnit}${looks}`;
}

function watchBeyond(
  is: (beyond: number) => boolean,
  headline: (count: number) => string,
): (list: WatchedList) => Watch {
  return ({ books }) => {
    const seen = new Seen();
    const book = books.of(BeyondBook);
    const see = (row: RowFacts): void => {
      const beyond = book.enter(row);
      if (beyond !== null && is(beyond)) seen.add(row.component.item, placeWords(row));
    };
    return {
      see,
      block: (block) => eachWith(TRAITS.outside, block, (row) => see(block.facts(row))),
      report: () => seen.report(headline),
    };
  };
}

const SOURCE = 'First principles, from span, length and mean chord of the frame issue';

export const farOutside: RowRule = {
  id: 'far-outside-aircraft',
  severity: 'blocker',
  sees: 'A counted row whose CG is farther away than twice the extent of the aircraft: its length fore or aft of the mean chord, half its span across.',
  why: 'Nothing there is part of the aircraft, and at that distance a light part outweighs all others in the inertia.',
  remedy: 'Check the coordinates, the length unit and the frame that the list declares.',
  source: SOURCE,
  keeps: FIRST_ROWS,
  watch: watchBeyond(
    (beyond) => beyond > FAR,
    (count) => counted(count, 'row lies far outside the aircraft', 'rows lie far outside the aircraft'),
  ),
};

export const outsideAircraft: RowRule = {
  id: 'outside-aircraft',
  severity: 'warning',
  sees: 'A counted row whose CG is more than 5 % beyond the extent of the aircraft: its length fore or aft of the mean chord, half its span across.',
  why: 'A part outside the aircraft is a slip of a coordinate, a unit or a frame, or a store that reaches beyond span or length.',
  remedy:
    'Check the coordinates, the length unit and the frame that the list declares, and span and length of the frame issue.',
  source: SOURCE,
  keeps: FIRST_ROWS,
  watch: watchBeyond(
    (beyond) => beyond > NEAR && beyond <= FAR,
    (count) => counted(count, 'row lies outside the aircraft', 'rows lie outside the aircraft'),
  ),
};

export const onDatum: RowRule = {
  id: 'on-datum',
  severity: 'warning',
  sees: 'A counted row with mass whose x, y and z are all exactly 0, in a list that is stated in the airframe’s own datum.',
  why: 'A place left empty or not known yet reads as the datum, which is seldom where a part is; its mass pulls the CG and adds inertia.',
  remedy: 'Give the place, or an estimate of it.',
  source: 'Common practice, no source',
  keeps: FIRST_ROWS,
  watch: eachRow(
    (row) => {
      const { position, mass } = row.component;
      if (!row.isCounted || mass === 0 || position.some((each) => each !== 0)) return null;
      // In a frame of its own, as of an engine, the origin is an ordinary place.
      if (row.declarations.pose.origin.some((each) => each !== 0)) return null;
      const { massUnit } = row.declarations;
      return `${inUnit(row.totalMass, massUnit)} at 0, 0, 0`;
    },
    (count) => counted(count, 'row lies exactly on the datum', 'rows lie exactly on the datum'),
    { traits: TRAITS.onDatum, isAll: true },
  ),
};
