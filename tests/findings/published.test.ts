import { describe, expect, it } from 'vitest';

import { findingsOnWhole } from '@/lib/findings/look';
import { radiiOf } from '@/lib/findings/whole/radii';
import { type Finding } from '@/lib/findings/finding';
import { type Moments, tensorOf } from '@/lib/frames/products';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { Placement } from '@/lib/mass/place';
import { rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { type Vec3 } from '@/lib/numerics/vec3';
import { toSi } from '@/lib/units/convert';
import {
  CLASS_RADII,
  IMPOSSIBLE,
  IZZ_BELOW_IYY,
  J35,
  JAS39,
  NESC_SPHERE,
  PUBLISHED,
  type PublishedAircraft,
} from '@/tests/references/aircraft';
import { declarations, diagonal, geometry } from '@/tests/support/mass';
import { keptRows } from './support';

const slugs = toSi(1, 'slug.ft2');

/** The findings on an aircraft that is one row, in body axes. */
function whole(
  mass: number,
  moments: Moments,
  size: Pick<AirframeGeometry, 'span' | 'length'>,
  cg: Vec3 = [0, 0, 0],
): Finding[] {
  const frame = geometry(size);
  const book = new SubtotalBook(new Placement(declarations(), frame));
  for (const row of keptRows([{ mass, moments, position: cg, growth: 0 }])) book.add(row);
  return findingsOnWhole(rollUp(book.subtotals(), [], frame, { E: 0.1, C: 0.1, A: 0.1 }), frame);
}

const sizeOf = ({ span, length }: PublishedAircraft) => ({
  span: toSi(span ?? 0, 'ft'),
  length: toSi(length, 'ft'),
});

function published(aircraft: PublishedAircraft, factor = 1): Finding[] {
  const { weight, ixx, iyy, izz, ixz } = aircraft;
  const moments = { ...diagonal([ixx, iyy, izz], factor * slugs), ixz: factor * slugs * ixz };
  return whole(toSi(weight, 'lb'), moments, sizeOf(aircraft));
}

const said = (findings: readonly Finding[]) => findings.map(({ rule, severity }) => `${severity} ${rule}`);

/** A published figure in slug.ft2 as a finding states it, to four digits in both systems. */
const both = (figure: number): string =>
  `${Number((figure * slugs).toPrecision(4))} kg.m2 (${Number(figure.toPrecision(4))} slug.ft2)`;

/** 12 m in span and 14 m long: a size for tensors that were published without one. */
const SIZE = { span: 12, length: 14 };

describe('published aircraft', () => {
  it('raise no blocker and no warning: false alarms are zero', () => {
    const alarms = PUBLISHED.flatMap((aircraft) =>
      published(aircraft)
        .filter(({ severity }) => severity !== 'note')
        .map(({ rule }) => `${aircraft.name} ${rule}`),
    );
    expect(alarms).toEqual([]);
  });

  it('raise one note in all: the sign of the Ixz of the A-4D', () => {
    // Teper, NASA CR-96008 (1969), table III-A: Ixz = -4070 slug.ft2, the principal axis 11.21 degrees from the body axis.
    const notes = PUBLISHED.flatMap((aircraft) =>
      published(aircraft).map(({ rule }) => [aircraft.name, rule]),
    );
    expect(notes).toEqual([['A-4D, flight condition 1', 'ixz-negative']]);
    const [a4d] = PUBLISHED.filter(({ name }) => name.startsWith('A-4D'));
    if (a4d === undefined) throw new Error('The A-4D is not in the table.');
    expect(published(a4d)[0]?.message).toMatch(
      /^Ixz is -5518 kg\.m2 \(-4070 slug\.ft2\) .* turned by 11\.21 degrees .* nose up/,
    );
  });

  it('lie within the bands of radii, and so does every class of the table', () => {
    const [span, length, mass] = [20, 16, 5000];
    for (const [name, rx, ry, rz] of CLASS_RADII) {
      // Ixx = b² m Rx²/4, Iyy = L² m Ry²/4, Izz = ((b + L)/2)² m Rz²/4.
      const moments = diagonal(
        [(span * rx) ** 2 / 4, (length * ry) ** 2 / 4, (((span + length) / 2) * rz) ** 2 / 4],
        mass,
      );
      const radii = radiiOf(tensorOf(moments), mass, geometry({ span, length }));
      expect(radii?.map((radius) => Number(radius.toFixed(12)))).toEqual([rx, ry, rz]);
      expect(said(whole(mass, moments, { span, length })), name).not.toContain('note radii-outside-class');
    }
  });
});

describe('published slips', () => {
  it.each(IMPOSSIBLE)('stop the $name: Ixx + Iyy < Izz ($source)', ({ ixx, iyy, izz }) => {
    const findings = said(whole(6000, diagonal([ixx, iyy, izz], slugs), SIZE));
    expect(findings[0]).toBe('blocker impossible-total');
    expect(findings).not.toContain('warning flatness-outside-band');
  });

  it.each(IZZ_BELOW_IYY)('warn of the $name, whose Izz is below its Iyy (JSBSim)', ({ ixx, iyy, izz }) => {
    const findings = whole(14000, diagonal([ixx, iyy, izz], slugs), SIZE);
    expect(said(findings).filter((each) => each.startsWith('warning'))).toEqual(['warning izz-not-largest']);
    expect(findings[0]?.message).toBe(
      `Izz is ${both(izz)}, Iyy ${both(iyy)}: of an aeroplane Izz is the largest.`,
    );
  });

  it('stop the JAS 39 whose mass would lie 11.7 m to the sides of a half span of 4.2 m', () => {
    const { mass, ixx, iyy, izz, span } = JAS39;
    const findings = whole(mass, diagonal([ixx, iyy, izz]), { span, length: 14.1 });
    expect(said(findings)[0]).toBe('blocker radius-beyond-extent');
    expect(findings[0]?.message).toBe(
      'The mass would lie outside the aircraft: across 11.71 m (460.9 in) against 4.191 m (165 in), half the span.',
    );
  });

  it('stop the NESC cannonball in the wrong unit, and not the right one', () => {
    const { mass, diameter, published: wrong, right } = NESC_SPHERE;
    const size = { span: toSi(diameter, 'in'), length: toSi(diameter, 'in') };
    const ball = (i: number) => said(whole(toSi(mass, 'slug'), diagonal([i, i, i], slugs), size));
    expect(ball(wrong)[0]).toBe('blocker radius-beyond-extent');
    expect(ball(right).filter((each) => each.startsWith('blocker'))).toEqual([]);
  });

  it.each(J35)(
    'note the sign of Ixz of the J35, $name, in the axes of its file',
    ({ mass, ixx, iyy, izz, ixz }) => {
      const at = (sign: number) =>
        said(whole(mass, { ...diagonal([ixx, iyy, izz]), ixz: sign * ixz }, { span: 9.4, length: 15.3 }));
      expect(at(1)).toContain('note ixz-negative');
      expect(at(-1)).not.toContain('note ixz-negative');
    },
  );

  it('warn of the unit that would explain all three radii', () => {
    const [f16] = PUBLISHED;
    if (f16 === undefined) throw new Error('The table is empty.');
    for (const [factor, words] of [
      [1 / 32.174, /about 32\.17 times too small/],
      [1 / 144, /about 144 times too small/],
      [1 / 4633.06, /about 4633 times too small/],
    ] as const) {
      const finding = published(f16, factor).find(({ rule }) => rule === 'total-unit-slip');
      expect(finding?.message).toMatch(words);
      expect(finding?.severity).toBe('warning');
    }
    expect(said(published(f16, 1.3))).not.toContain('warning total-unit-slip');
  });

  it('warn of a tensor about the datum, 8 m ahead of the CG', () => {
    const { weight, ixx, iyy, izz, ixz, span, length } = PUBLISHED[0] ?? {};
    const mass = toSi(weight ?? NaN, 'lb');
    const own = { ...diagonal([ixx ?? NaN, iyy ?? NaN, izz ?? NaN], slugs), ixz: slugs * (ixz ?? NaN) };
    const size = { span: toSi(span ?? NaN, 'ft'), length: toSi(length ?? NaN, 'ft') };
    const moved = { ...own, iyy: own.iyy + 64 * mass, izz: own.izz + 64 * mass };
    const about = (moments: Moments) => said(whole(mass, moments, size, [-8, 0, 0]));
    expect(about(moved)).toContain('warning total-about-datum');
    expect(about(own)).not.toContain('warning total-about-datum');
  });
});

describe('findings on the shape of an aircraft', () => {
  const size = { span: 20, length: 16 };
  const shape = (ixx: number, iyy: number, izz: number, more: Partial<Moments> = {}, cg: Vec3 = [0, 0, 0]) =>
    said(whole(5000, { ...diagonal([ixx, iyy, izz], 5000), ...more }, size, cg));

  it('warn outside the band of (Ixx + Iyy)/Izz, where Izz is largest', () => {
    expect(shape(6, 7, 12)).toEqual([]);
    expect(shape(6, 7, 12.9)).toEqual(['warning flatness-outside-band']);
    expect(shape(6, 7, 10.2)).toEqual(['warning flatness-outside-band']);
    expect(shape(6, 7, 10.5)).toEqual([]);
    expect(shape(6, 7, 6.9)).toContain('warning izz-not-largest');
  });

  it('note radii that no class has', () => {
    expect(shape(2.5, 7, 9)).toEqual(['note radii-outside-class']);
  });

  it('judge only where span and length are known', () => {
    expect(said(whole(5000, diagonal([6, 7, 6.9], 5000), { span: 0, length: 0 }))).toEqual([]);
  });

  it('note a CG off the plane of symmetry, and lateral products', () => {
    expect(shape(6, 7, 12, {}, [0, 0.09, 0])).toEqual([]);
    expect(shape(6, 7, 12, {}, [0, 0.11, 0])).toEqual(['note lateral-cg']);
    expect(shape(6, 7, 12, { ixy: 900 })).toEqual([]);
    expect(shape(6, 7, 12, { ixy: 1000 })).toEqual(['note lateral-products']);
    expect(shape(6, 7, 12, { iyz: -1400 })).toEqual(['note lateral-products']);
  });

  it('note an Ixz that the places of the groups contradict', () => {
    const frame = geometry(size);
    const rolled = (ixz: number): string[] => {
      const book = new SubtotalBook(new Placement(declarations(), frame));
      const rows = keptRows([
        {
          group: 'Body',
          mass: 4800,
          moments: { ...diagonal([6, 6.4, 11.4], 4800), ixz },
          position: [0.2, 0, 0.08],
        },
        {
          group: 'Tail',
          mass: 200,
          moments: diagonal([0.5, 0.5, 0.5], 200),
          position: [-5, 0, -3],
          growth: 0,
        },
      ]);
      for (const row of rows) book.add({ ...row, growth: 0 });
      return said(findingsOnWhole(rollUp(book.subtotals(), [], frame, { E: 0.1, C: 0.1, A: 0.1 }), frame));
    };
    // Mass behind and above: the layout alone gives about +3000 kg.m2.
    expect(rolled(0)).toEqual([]);
    expect(rolled(-2000)).toEqual([]);
    expect(rolled(-4500)).toEqual(['note ixz-negative', 'note ixz-against-layout']);
  });
});
