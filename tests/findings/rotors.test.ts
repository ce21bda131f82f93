import { describe, expect, it } from 'vitest';

import { findingsOnRotors } from '@/lib/findings/look';
import { carrierTensor } from '@/lib/findings/rotors/carrier';
import { type RotatingParts } from '@/lib/findings/rule';
import { Placement } from '@/lib/mass/place';
import { type Rotor } from '@/lib/rotors/rotor';
import { radians } from '@/lib/units/convert';
import { aComponent, declarations, diagonal, geometry } from '@/tests/support/mass';

const rotor = (name: string, yaw: number, more: Partial<Rotor> = {}): Rotor => ({
  rotor: name,
  polarInertia: 2,
  axis: { kind: 'angles', yaw: radians(yaw), pitch: 0, sense: 'cw' },
  gearRatio: 1,
  shaft: name,
  component: `plant/${name}`,
  blades: 4,
  polarInertiaSigma: null,
  group: null,
  note: null,
  ...more,
});

function said(rotors: readonly Rotor[], more: Partial<RotatingParts> = {}, speed = 100) {
  const point = { code: 'cruise', title: 'Cruise' };
  const speeds = rotors.map(({ shaft }) => ({ shaft, speed, sigma: null }));
  return findingsOnRotors({ rotors, points: [{ ...point, speeds }], ...more });
}

describe('findings on rotors', () => {
  it('warn of one that stands still at every operating point', () => {
    const one = rotor('P1', 0);
    expect(said([one])).toEqual([]);
    expect(said([one], {}, 0)).toMatchObject([
      {
        rule: 'rotor-never-turns',
        severity: 'warning',
        message: '1 rotor stands still at every operating point. First, P1, shaft P1.',
      },
    ]);
    const points = [0, 50].map((speed, i) => ({
      code: `p${i}`,
      title: 'P',
      speeds: [{ shaft: 'P1', speed, sigma: null }],
    }));
    expect(said([one], { points })).toEqual([]);
    expect(said([one], { points: [] })).toEqual([]);
  });

  it('note one that names no row, and warn of one whose row is not there', () => {
    expect(said([rotor('P1', 0, { component: null })])).toMatchObject([
      { rule: 'rotor-without-component', severity: 'note', rows: ['P1'] },
    ]);
    const none = { geometry: geometry(), carriers: new Map() };
    expect(said([rotor('P1', 0)], none)).toMatchObject([
      { rule: 'rotor-component-missing', severity: 'warning', rows: ['P1'] },
    ]);
  });

  it('warn of one with more inertia about its shaft than the row that carries it', () => {
    const placement = new Placement(declarations(), geometry());
    // A disc about its own x axis, which a yaw of 60 degrees turns: about body x, cos² 60 of 3 and sin² 60 of 1.6.
    const disc = aComponent({ mass: 40, moments: diagonal([3, 1.6, 1.6]) });
    const turned = { ...disc, orientation: { yaw: radians(60), pitch: 0, roll: 0 } };
    const held = (component: typeof disc, polarInertia: number, axis: Rotor['axis']) =>
      said([rotor('P1', 0, { polarInertia, axis })], {
        geometry: geometry(),
        carriers: new Map([['plant/P1', carrierTensor(component, placement)]]),
      }).map(({ rule }) => rule);
    const ahead: Rotor['axis'] = { kind: 'arrow', x: 1, y: 0, z: 0, hand: 'rh' };
    const along: Rotor['axis'] = { kind: 'arrow', x: 0.5, y: Math.sqrt(0.75), z: 0, hand: 'rh' };
    expect(held(disc, 3.05, ahead)).toEqual([]);
    expect(held(disc, 3.1, ahead)).toEqual(['polar-beyond-component']);
    expect(held(turned, 2, ahead)).toEqual(['polar-beyond-component']);
    expect(held(turned, 1.95, ahead)).toEqual([]);
    expect(held(turned, 3, along)).toEqual(['shaft-without-twin']);
    // A row without moments says nothing about its rotor.
    expect(held(aComponent({ mass: 40 }), 3.1, ahead)).toEqual([]);
  });

  it('note a shaft turned out of the plane of symmetry without a twin', () => {
    expect(said([rotor('L', -5), rotor('R', 5)])).toEqual([]);
    expect(said([rotor('L', -5), rotor('R', 5, { polarInertia: 2.5 })])).toMatchObject([
      { rule: 'shaft-without-twin', severity: 'note', count: 2 },
    ]);
    expect(said([rotor('L', -5), rotor('R', -5)]).map(({ rows }) => rows)).toEqual([['L', 'R']]);
    expect(said([rotor('L', -2)])).toEqual([]);
    const across: Rotor['axis'] = { kind: 'arrow', x: 0, y: 1, z: 0, hand: 'lh' };
    expect(said([rotor('X', 0, { axis: across })], { geometry: geometry() })).toEqual([]);
  });

  it('leave arrows alone where the airframe is not known', () => {
    const axis: Rotor['axis'] = { kind: 'arrow', x: 1, y: 0.2, z: 0, hand: 'rh' };
    expect(said([rotor('X', 0, { axis })])).toEqual([]);
    expect(said([rotor('X', 0, { axis })], { geometry: geometry() })).toHaveLength(1);
  });
});
