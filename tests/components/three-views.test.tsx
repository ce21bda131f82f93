import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { Datum, datumWords, FarDatum, Sides } from '@/components/three-views/landmarks';
import { LeftOutWords } from '@/components/three-views/left-out-words';
import { MarkLayer } from '@/components/three-views/mark-layer';
import { rowHref } from '@/components/three-views/piece-table';
import { axisName, edgeTicks } from '@/components/three-views/ruled-edge';
import { sheetOf } from '@/components/three-views/sheet';
import { paramsWithRegion, regionFromParams } from '@/components/three-views/use-region';
import { viewsAsked, viewsHref } from '@/components/three-views/views-address';
import { type AxisTriple } from '@/lib/frames/axes';
import { type Bounds } from '@/lib/three-views/bounds';
import { groupKeys } from '@/lib/three-views/group-key';
import { type Picture, type Piece, type PictureRow } from '@/lib/three-views/picture';
import { OUTPUT_UNITS } from '@/lib/units/names';

const AXES: AxisTriple = ['aft', 'right', 'up'];
const BOUNDS: Bounds = [
  [2, 18],
  [-9, 9],
  [0, 6],
];

const ROW: PictureRow = {
  item: 'W-1',
  description: 'Spar',
  list: 0,
  group: 'Wing/Spars',
  category: 'empty',
  mass: 10,
  places: [[8, 3, 2]],
  rows: 1,
  cell: false,
};

const PICTURE: Picture = {
  geometry: { axes: AXES, lateralPlane: 0, lemac: [7, 0, 2], mac: 2, reference: [8, 0, 2] },
  bounds: BOUNDS,
  radiusOfOne: 0.1,
  groups: groupKeys(new Map([['Wing', 10]])),
  lists: [{ code: 'wing', title: 'Wing', revision: 3 }],
  rows: [ROW],
  total: { mass: 10, cg: [8, 3, 2] },
  points: [],
  left: { memo: 0, waiting: 0, ashore: 0, inCells: null, uncategorised: 0 },
};

const piece = (said: Partial<PictureRow> = {}): Piece => {
  const row = { ...ROW, ...said };
  return { row, place: [8, 3, 2], mass: row.mass, image: false };
};

describe('a sheet', () => {
  it('starts forward and at the top, and turns a left-handed frame about', () => {
    expect(sheetOf('side', AXES, BOUNDS).at([2, 0, 6])).toEqual({ x: 0, y: 0 });
    expect(sheetOf('plan', AXES, BOUNDS).at([2, 9, 0])).toEqual({ x: 0, y: 0 });
    expect(sheetOf('plan', ['aft', 'left', 'up'], BOUNDS).at([2, -9, 0])).toEqual({ x: 0, y: 0 });
    expect(sheetOf('front', AXES, BOUNDS).at([0, 9, 6])).toEqual({ x: 0, y: 0 });
  });

  it('gives back in metres what it drew as shares', () => {
    const sheet = sheetOf('front', AXES, BOUNDS);
    const { x, y } = sheet.percent([0, 4.5, 1.5]);
    expect(sheet.metres(x / 100, y / 100)).toEqual([-4.5, 1.5]);
  });
});

describe('the edges of the views', () => {
  it('are named by the frame, and count in its sense: butt lines fall to the right of the front view', () => {
    const { ticks, share } = edgeTicks(sheetOf('front', AXES, BOUNDS), 'across', BOUNDS, 'm');
    expect(axisName(AXES, 1)).toBe('Butt line y right');
    expect(ticks.labelled).toContain(8);
    expect(share(8)).toBeLessThan(share(-8));
  });

  it('are ruled in inches where inches are asked for', () => {
    // 16 m are 630 in; 1 in is 0.0254 m (NIST SP 811).
    const { ticks, share } = edgeTicks(sheetOf('side', AXES, BOUNDS), 'across', BOUNDS, 'in');
    expect(ticks.step).toBe(100);
    expect(share(400)).toBeCloseTo((400 * 0.0254 - 2) / 16, 12);
  });
});

describe('the datum', () => {
  it('is marked on a sheet that reaches it', () => {
    const bounds: Bounds = [[-1, 18], BOUNDS[1], BOUNDS[2]];
    expect(renderToStaticMarkup(<Datum sheet={sheetOf('side', AXES, bounds)} bounds={bounds} />)).toContain(
      'Datum',
    );
  });

  it('is pointed at with its distance from the edge where it lies beyond', () => {
    const sheet = sheetOf('side', AXES, BOUNDS);
    expect(renderToStaticMarkup(<Datum sheet={sheet} bounds={BOUNDS} />)).toBe('');
    expect(datumWords(sheet, BOUNDS, 'm')).toBe('Datum 2.0 m farther forward');
    expect(datumWords(sheet, BOUNDS, 'in')).toBe('Datum 79 in farther forward');
    const level: Bounds = [BOUNDS[0], BOUNDS[1], [-3, 6]];
    const arrow = <FarDatum sheet={sheetOf('side', AXES, level)} bounds={level} unit="m" />;
    expect(renderToStaticMarkup(arrow)).toContain('rotate(180)');
  });
});

describe('the marks', () => {
  const draw = (pieces: readonly Piece[]): string =>
    renderToStaticMarkup(
      <MarkLayer
        sheet={sheetOf('side', AXES, BOUNDS)}
        pieces={pieces}
        keys={new Map(PICTURE.groups.map((key) => [key.group, key]))}
        radiusOfOne={PICTURE.radiusOfOne}
      />,
    );

  it('have the colour of their group and an outline in ink', () => {
    expect(draw([piece()])).toMatch(/fill="var\(--series-1\)".*stroke-ink/);
  });

  it('are hollow where mass is taken away', () => {
    expect(draw([piece({ mass: -10 })])).toMatch(/fill="none".*stroke-ink/);
  });

  it('lead to their rows; cells and items on board have none', () => {
    expect(rowHref('/lists', PICTURE, piece())).toBe('/lists/wing?revision=3&find=W-1&row=W-1#rows');
    expect(rowHref('/lists', PICTURE, piece({ cell: true }))).toBeNull();
    expect(rowHref('/lists', PICTURE, piece({ list: null }))).toBeNull();
  });
});

describe('what is said on the picture', () => {
  it('tells the sides of the aircraft: seen from ahead, its right is at the left', () => {
    const markup = renderToStaticMarkup(
      <Sides sheet={sheetOf('front', AXES, BOUNDS)} axes={AXES} lateralPlane={0} />,
    );
    expect(markup.indexOf('right side')).toBeGreaterThan(0);
    expect(markup.indexOf('right side')).toBeLessThan(markup.indexOf('left side'));
  });

  it('leaves nothing out in silence', () => {
    const far = { ...ROW, places: [[4000, 0, 0]] as const };
    const left = {
      memo: 1,
      waiting: 2,
      ashore: 3,
      inCells: { rows: 4, mass: 5, size: 0.5 },
      uncategorised: 6,
    };
    const text = renderToStaticMarkup(
      <LeftOutWords picture={{ ...PICTURE, rows: [far], left }} units={OUTPUT_UNITS.si} />,
    ).replace(/<[^>]+>/g, '');
    for (const words of [
      '1 mark lies far beyond the airframe',
      '1 memo row is not summed',
      '2 adjustments are not approved',
      '3 rows are of a category that is not on board',
      '4 lighter rows',
      '6 items on board',
    ])
      expect(text).toContain(words);
  });
});

describe('the address of the views', () => {
  it('holds filters, units and region, and is as short as it can be', () => {
    const asked = {
      condition: 'take-off',
      units: 'us',
      within: 'Wing/Ribs',
      x: '5..9',
      z: '..2',
      points: 'hidden',
    };
    expect(viewsHref('/views', viewsAsked(asked))).toBe(
      '/views?condition=take-off&units=us&points=hidden&within=Wing%2FRibs&x=5..9&z=..2',
    );
    expect(viewsHref('/views', viewsAsked({ units: 'si', x: 'nonsense', category: 'nonsense' }))).toBe(
      '/views',
    );
  });

  it('keeps what belongs to others when the region changes', () => {
    const params = paramsWithRegion(new URLSearchParams('sort=mass&x=1..2&y=3..4'), [
      [5, 6],
      null,
      [-1, Infinity],
    ]);
    expect(params.toString()).toBe('sort=mass&x=5..6&z=-1..');
    expect(regionFromParams(params)).toEqual([[5, 6], null, [-1, Infinity]]);
  });
});
