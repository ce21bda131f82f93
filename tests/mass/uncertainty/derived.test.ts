import { describe, expect, it } from 'vitest';

import { AccountSum } from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { accountOfComponent, Placement } from '@/lib/mass/place';
import { resultOf } from '@/lib/mass/result';
import { NO_GROWTH } from '@/lib/mass/roll-up';
import { UncertaintyBook } from '@/lib/mass/uncertainty/book';
import { combineUncertainty } from '@/lib/mass/uncertainty/combine';
import { principalSigma, radiiSigma } from '@/lib/mass/uncertainty/derived';
import { uncertaintyOf } from '@/lib/mass/uncertainty/uncertainty-of';
import { aComponent, declarations, diagonal, geometry, properties } from '@/tests/support/mass';
import { normalNumbers } from '@/tests/support/random';
import { SETTINGS, VALUES, moved, sigmas, uncertainRows } from './support';

type Setting = Pick<(typeof SETTINGS)[number], 'list' | 'frame'>;

function rolledUp(rows: readonly Component[], { list, frame }: Setting) {
  const sum = new AccountSum();
  for (const row of rows) sum.add(accountOfComponent(row, list, frame));
  return { account: sum.account, result: resultOf(sum.account, frame) };
}

function covarianceOf(rows: readonly Component[], { list, frame }: Setting) {
  const book = new UncertaintyBook(new Placement(list, frame));
  for (const row of rows) book.add(row);
  const { basic } = combineUncertainty(book.sums(), [], NO_GROWTH);
  const known = uncertaintyOf(basic, rolledUp(rows, { list, frame }).account, frame).properties;
  if (known === null) throw new Error('The rows have no mass.');
  return known.covariance;
}

/** σ of six figures over samples of rows with normal errors. */
function scatter(rows: readonly Component[], setting: Setting, n: number): number[] {
  const normal = normalNumbers(1867);
  const samples = Array.from({ length: n }, () => {
    const erring = rows.map((row) =>
      VALUES.reduce((so, value) => moved(so, value, (row.sigma?.[value] ?? 0) * normal()), row),
    );
    const { radii, principal } = properties(rolledUp(erring, setting).result);
    if (radii === null) throw new Error('A moment is negative.');
    return [radii.x, radii.y, radii.z, ...principal.moments];
  });
  return Array.from({ length: 6 }, (_, k) => {
    const mean = samples.reduce((sum, sample) => sum + (sample[k] ?? NaN), 0) / n;
    return Math.sqrt(samples.reduce((sum, sample) => sum + ((sample[k] ?? NaN) - mean) ** 2, 0) / (n - 1));
  });
}

describe('the uncertainty of what follows from mass and tensor', () => {
  it.each(SETTINGS)('is the scatter of radii and principal moments of $name, within sampling error', (of) => {
    const rows = uncertainRows(12, 5);
    const n = 3000;
    const expected = scatter(rows, of, n);
    const { mass, properties: found } = rolledUp(rows, of).result;
    if (found === null) throw new Error('The rows have no mass.');
    const covariance = covarianceOf(rows, of);
    const sigma = [
      ...(radiiSigma(mass, found.inertia, covariance) ?? []),
      ...principalSigma(found.principal, covariance),
    ];
    expect(sigma).toHaveLength(6);
    // A sampled σ errs by its share 1/sqrt(2n) (one σ); six of them in four settings stay within 4.
    sigma.forEach((value, k) =>
      expect(Math.abs(value / (expected[k] ?? NaN) - 1)).toBeLessThanOrEqual(4 / Math.sqrt(2 * n)),
    );
  });

  it('leaves the radii of one row certain whose moments go with its mass', () => {
    const row = aComponent({ mass: 4, moments: diagonal([2, 3, 4], 4), sigma: sigmas({ mass: 0.4 }) });
    const setting = { list: declarations(), frame: geometry() };
    const radii = radiiSigma(4, row.moments, covarianceOf([row], setting));
    radii?.forEach((value) => expect(value).toBeLessThan(1e-9));
    expect(radiiSigma(4, { ixx: 0, iyy: 1, izz: 1 }, covarianceOf([row], setting))).toBeNull();
  });

  it('of principal moments along the body axes is that of the moments', () => {
    const row = aComponent({
      mass: 4,
      moments: diagonal([2, 3, 4], 4),
      sigma: sigmas({ ixx: 0.1, iyy: 0.2, izz: 0.3, ixy: 5 }),
    });
    const setting = { list: declarations(), frame: geometry() };
    const { principal } = properties(rolledUp([row], setting).result);
    principalSigma(principal, covarianceOf([row], setting)).forEach((value, k) =>
      expect(value).toBeCloseTo([0.1, 0.2, 0.3][k] ?? NaN, 12),
    );
  });
});
