import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { describe, expect, it } from 'vitest';
import { inUnits } from '@/lib/baselines/document-units';
import example from '@/lib/contracts/api/baseline-example.json';
import { expectConverted } from './converted';

describe('a document in US units', () => {
  it('has every number with a unit converted once, and nothing else', () => {
    expectConverted(example, inUnits(example, 'us'), { all: false });
  });

  it('is off by the exact factors of the pound, the inch and the slug', () => {
    // NIST SP 811 (2008), appendix B.8: 1 lb = 0.453 592 37 kg, 1 in = 0.0254 m, 1 slug.ft2 = 1.355 818 kg.m2.
    const us = inUnits({ mass: 0.45359237, airframe: { x: 0.0254 }, inertia: { ixy: -1.355818 } }, 'us');
    expect([us.mass, us.airframe.x]).toEqual([1, 1]);
    expect(us.inertia.ixy).toBeCloseTo(-1, 6);
  });

  it('in SI is the document itself', () => {
    expect(inUnits(example, 'si')).toBe(example);
  });
});

it('the documented example has the digest that it states', () => {
  const { digest, state, ...document } = example;
  expect(state).toBe('current');
  const sum = createHash('sha256')
    .update(canonicalize(document) ?? '')
    .digest('hex');
  expect(digest).toBe(`sha256:${sum}`);
});
