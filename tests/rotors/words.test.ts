import { describe, expect, it } from 'vitest';
import { type AxisTriple } from '@/lib/frames/axes';
import { type SpinAxis } from '@/lib/rotors/rotor';
import { axisAsGiven, bodySpin, senseInWords } from '@/lib/rotors/words';
import { radians } from '@/lib/units/convert';

const USUAL: AxisTriple = ['aft', 'right', 'up'];
const angles = (yaw: number, pitch: number, sense: 'cw' | 'ccw'): SpinAxis => ({
  kind: 'angles',
  yaw: radians(yaw),
  pitch: radians(pitch),
  sense,
});
const arrow = (x: number, y: number, z: number, hand: 'rh' | 'lh'): SpinAxis => ({
  kind: 'arrow',
  x,
  y,
  z,
  hand,
});
const words = (axis: SpinAxis, axes = USUAL) => senseInWords(bodySpin(axis, { axes, incidence: 0 }));

describe('the sense of a rotor in words', () => {
  it('is clockwise seen from behind for a right hand about forward (domain section 7), whatever the airframe axes', () => {
    expect(words(angles(0, 0, 'cw'))).toBe('Clockwise seen from behind');
    expect(words(angles(-1.5, 2, 'ccw'))).toBe('Counter-clockwise seen from behind');
    expect(words(arrow(-1, 0, 0, 'rh'))).toBe('Clockwise seen from behind');
    expect(words(arrow(-1, 0, 0, 'rh'), ['aft', 'left', 'up'])).toBe('Clockwise seen from behind');
    expect(words(arrow(1, 0, 0, 'rh'))).toBe('Counter-clockwise seen from behind');
  });

  it('is seen from above for a lifting rotor: a right hand about up turns counter-clockwise', () => {
    expect(words(arrow(0, 0, 1, 'rh'))).toBe('Counter-clockwise seen from above');
    expect(words(arrow(0, 0, 1, 'lh'))).toBe('Clockwise seen from above');
  });

  it('is seen from the left for a shaft across: a right hand about right', () => {
    expect(words(arrow(0, 1, 0, 'rh'))).toBe('Clockwise seen from the left');
    expect(words(arrow(0, -1, 0, 'rh'), ['aft', 'left', 'up'])).toBe('Clockwise seen from the left');
  });
});

describe('the axis as given', () => {
  it('reads as the file has it', () => {
    expect(axisAsGiven(angles(-1.5, 2, 'cw'))).toBe('Forward, 1.5° left, 2° up; clockwise');
    expect(axisAsGiven(angles(0, 0, 'ccw'))).toBe('Forward, straight; counter-clockwise');
    expect(axisAsGiven(arrow(0, 250, 0, 'lh'))).toBe('Arrow 0, 250, 0; left hand');
  });
});
