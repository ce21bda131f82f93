import { beforeAll, describe, expect, it } from 'vitest';
import { makeDemo } from '@/fixtures/demo/demo';
import { arrow } from '@/lib/frames/axes';
import { listToAirframe } from '@/lib/frames/pose';
import { findingsOnRotors } from '@/lib/findings/look';
import { type RotorsReading, readRotors } from '@/lib/ingest/rotors';
import { dotVec } from '@/lib/numerics/vec3';
import { spinArrow } from '@/lib/rotors/axis';
import { angularMomentum } from '@/lib/rotors/momentum';
import { type OperatingPoint } from '@/lib/rotors/rotor';
import { radiansPerSecond } from '@/lib/units/convert';
import { type ReadRevision, bytesOf, readAll } from './support';

const demo = makeDemo();
const { geometry } = demo.frameIssue;
const points: OperatingPoint[] = demo.rotatingParts.points.map(({ code, title, speeds }) => ({
  code,
  title,
  speeds: speeds.map(({ shaft, rpm }) => ({ shaft, speed: radiansPerSecond(rpm), sigma: null })),
}));
let reading: RotorsReading;
let read: ReadRevision[] = [];
beforeAll(async () => {
  const { csv, inertiaUnit } = demo.rotatingParts;
  reading = await readRotors(bytesOf(csv), { inertiaUnit });
  read = await readAll(demo);
});

describe('the rotating parts', () => {
  it('read without a problem and raise no finding at the four operating points', () => {
    expect(reading.problems).toEqual([]);
    expect(points).toHaveLength(4);
    expect(findingsOnRotors({ rotors: reading.rotors, points })).toEqual([]);
  });

  it('name rows that exist and state the same inertia about the spin axis', () => {
    expect(reading.rotors).toHaveLength(11);
    for (const { rotor, component, polarInertia } of reading.rotors) {
      const [code, item] = component?.split('/') ?? [];
      const revisions = read.filter(({ list }) => list.code === code);
      const row = revisions.at(-1)?.components.find((each) => each.item === item);
      const { ixx = NaN, iyy = NaN } = row?.moments ?? {};
      const own = rotor === 'Auxiliary unit' ? iyy : ixx;
      expect(Math.abs(own / polarInertia - 1), rotor).toBeLessThan(1e-4);
    }
  });

  it('turn about the x axis of the frame in which the power plant is listed', () => {
    const plant = demo.lists.find(({ code }) => code === 'power-plant')?.declarations;
    if (!plant) throw new RangeError('There is no power plant.');
    const matrix = listToAirframe(plant.axes, plant.pose, geometry.axes);
    const left = reading.rotors.filter(({ rotor }) => rotor.startsWith('Left'));
    expect(left).toHaveLength(5);
    for (const { axis } of left) {
      const along = spinArrow(axis, geometry.axes);
      const aft = [matrix[0][0], matrix[1][0], matrix[2][0]] as const;
      expect(Math.abs(Math.abs(dotVec(along, aft)) - 1)).toBeLessThan(1e-12);
      expect(dotVec(aft, arrow('aft', geometry.axes))).toBeGreaterThan(0.99);
    }
  });

  it('sum to a momentum forward, for both propellers turn clockwise seen from behind, largest at take-off', () => {
    const momenta = points.map((point) => angularMomentum(reading.rotors, point, geometry));
    for (const { total } of momenta) {
      expect(total[0]).toBeGreaterThan(0);
      expect(total[2]).toBeLessThan(0);
    }
    const byCode = new Map(points.map(({ code }, k) => [code, momenta[k]?.total[0] ?? NaN]));
    expect(Math.max(...byCode.values())).toBe(byCode.get('take-off'));
  });

  it('run no faster at the propeller tips than sound, at take-off (common practice, no source)', () => {
    const takeOff = points.find(({ code }) => code === 'take-off');
    const speed = takeOff?.speeds.find(({ shaft }) => shaft === 'left-propeller')?.speed ?? NaN;
    expect(speed * 1.35).toBeLessThan(0.8 * 340.3);
  });
});
