import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';

import { placeInAirframe, placeInForce } from '@/components/lists/row-place';
import { type ListRow } from '@/lib/contracts/list-rows';
import { changeFromFormer } from '@/lib/frames/issue-change';
import { NO_POSE } from '@/lib/frames/pose';
import { declarations } from '@/tests/support/mass';

const list = declarations({ axes: ['aft', 'right', 'up'], lengthUnit: 'mm' });
const frame = { axes: ['aft', 'right', 'up'], lateralPlane: 0.1 } as const;
const row = {
  position: 1,
  line: null,
  cells: { item: 'rib', x: 6000, y: 2500, z: 1200, symmetry: 'pair' },
  own: {},
};

const told = (items: ReturnType<typeof placeInAirframe>) =>
  items.map(({ term, value }) => `${term}: ${renderToStaticMarkup(value).replace(/<[^>]*>/g, '')}`);

describe('the place of a row', () => {
  it('is told from the datum of its own issue, with the image of a pair', () => {
    expect(told(placeInAirframe(row as ListRow, list, frame))).toEqual([
      'x aft: 6.0000 m',
      'y right: 2.5000 m and -2.3000 m',
      'z up: 1.2000 m',
    ]);
  });

  it('and from that of the issue in force, the image where its own issue puts it', () => {
    // By hand: the datum 2.5 m further ahead, butt lines to the left.
    const axes = ['aft', 'left', 'up'] as const;
    const change = changeFromFormer(frame.axes, { ...NO_POSE, origin: [2.5, 0, 0] }, axes);
    expect(told(placeInForce(row as ListRow, list, frame, { axes, change }))).toEqual([
      'x aft: 8.5000 m',
      'y left: -2.5000 m and 2.3000 m',
      'z up: 1.2000 m',
    ]);
  });
});
