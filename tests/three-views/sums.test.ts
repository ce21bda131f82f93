import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type AxisTriple } from '@/lib/frames/axes';
import { type AirframeVec } from '@/lib/frames/tags';
import { Placement } from '@/lib/mass/place';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { placesOf } from '@/lib/three-views/places';
import { holds, type Region } from '@/lib/three-views/region';
import { sumsOf } from '@/lib/three-views/sums';
import { aComponent, declarations, geometry } from '@/tests/support/mass';

const AXES: AxisTriple = ['aft', 'right', 'up'];
const coordinate = fc.double({ min: -20, max: 20, noNaN: true });
const row = fc.record({
  mass: fc.double({ min: 0.01, max: 500, noNaN: true }),
  quantity: fc.integer({ min: 1, max: 9 }),
  pair: fc.boolean(),
  position: fc.tuple(coordinate, coordinate, coordinate),
});

describe('the sums of what is brushed', () => {
  it('equal the roll-up of the rows that are in the region', () => {
    fc.assert(
      fc.property(
        fc.array(row, { minLength: 1, maxLength: 40 }),
        fc.double({ min: 1, max: 15, noNaN: true }),
        (rows, half) => {
          const frame = geometry({ axes: AXES, reference: [3, 0, 1] });
          const list = declarations({ axes: AXES });
          const placement = new Placement(list, frame);
          // Even about the plane of symmetry, so that a pair is in it with both of its sides or with none.
          const region: Region = [[-half, half], [-half, half], null];
          const pieces: { mass: number; place: AirframeVec }[] = [];
          const book = new SubtotalBook(placement);
          for (const [index, said] of rows.entries()) {
            const component = aComponent({ ...said, item: `R-${index}` });
            const places = placesOf(component, placement).filter((place) => holds(region, place));
            for (const place of places) pieces.push({ mass: said.quantity * said.mass, place });
            if (places.length > 0) book.add(component);
          }
          const brushed = sumsOf(pieces, frame.reference);
          const { basic } = rollUp(book.subtotals(), [], frame, NO_GROWTH);
          expect(Math.abs(brushed.mass - basic.mass)).toBeLessThanOrEqual(1e-12 * basic.mass);
          if (basic.properties === null) expect(brushed.cg).toBeNull();
          basic.properties?.cg.forEach((value, k) =>
            expect(Math.abs((brushed.cg?.[k] ?? NaN) - value)).toBeLessThanOrEqual(1e-11),
          );
        },
      ),
      { numRuns: 60 },
    );
  });

  it('lose no digits to a datum 10 km away', () => {
    // By hand: 1 kg and 3 kg a metre apart have their CG 0.75 m from the first.
    const { cg } = sumsOf(
      [
        { mass: 1, place: [10000, 0, 0] },
        { mass: 3, place: [10001, 0, 0] },
      ],
      [10000, 0, 0],
    );
    expect(cg).toEqual([10000.75, 0, 0]);
  });

  it('have no CG where what is taken away is as much as what is there', () => {
    const place: AirframeVec = [1, 2, 3];
    expect(
      sumsOf(
        [
          { mass: 5, place },
          { mass: -5, place },
        ],
        place,
      ),
    ).toEqual({ mass: 0, cg: null });
    expect(sumsOf([], place)).toEqual({ mass: 0, cg: null });
  });
});
