import { type ReactElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';

import { ConditionResultView } from '@/components/configurations/condition-result';
import { CgTable } from '@/components/mass/cg-table';
import { MomentumTable } from '@/components/mass/momentum-table';
import { PrincipalTable } from '@/components/mass/principal-table';
import { statedSigma } from '@/components/rotors/stated-sigma';
import { Placement } from '@/lib/mass/place';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { UncertaintyBook } from '@/lib/mass/uncertainty/book';
import { combineUncertainty } from '@/lib/mass/uncertainty/combine';
import { uncertaintyOf } from '@/lib/mass/uncertainty/uncertainty-of';
import { type OutputUnits } from '@/lib/units/names';
import { aComponent, declarations, diagonal, geometry } from '@/tests/support/mass';
import { sigmas } from '@/tests/mass/uncertainty/support';

const SI: OutputUnits = { mass: 'kg', length: 'm', inertia: 'kg.m2', angularMomentum: 'kg.m2/s' };

/** The text of each row of the tables, cell by cell. */
function rows(element: ReactElement): string[][] {
  const markup = renderToStaticMarkup(element);
  return [...markup.matchAll(/<tr[^>]*>(.*?)<\/tr>/g)].map(([, row = '']) =>
    [...row.matchAll(/<t[hd][^>]*>(.*?)<\/t[hd]>/g)].map(([, cell = '']) => cell.replace(/<[^>]*>/g, '')),
  );
}

const named = (found: readonly string[][], name: string): string[] =>
  found.find(([first]) => first === name)?.slice(1) ?? [];

/*
 * JCGM 100:2008, 7.2.6: at most two figures of an uncertainty, and the value rounded to match.
 */
describe('a standard deviation beside a result', () => {
  it('of the CG stands under it, and sets its figures', () => {
    const axes = ['aft', 'right', 'up'] as const;
    const basic = { cg: [8.123456, 0.001234, 1.987654] as const, percentMac: 24.98765 };
    const sigma = { cg: [0.0123, 0.0045, 0.023] as const, percentMac: 0.61 };
    const found = rows(
      <CgTable
        basic={basic}
        predicted={basic}
        predictedSigma={{ ...sigma, percentMac: 0.63 }}
        {...{ sigma, axes, units: SI }}
      />,
    );
    expect(named(found, 'Basic')).toEqual(['8.1235', '0.0012', '1.9877', '24.99']);
    expect(named(found, '± of the basic CG')).toEqual(['0.0123', '0.0045', '0.0230', '0.61']);
    expect(named(found, '± of the predicted CG')).toEqual(['0.0123', '0.0045', '0.0230', '0.63']);
    const bare = rows(<CgTable basic={basic} predicted={null} sigma={null} axes={axes} units={SI} />);
    expect(bare).toHaveLength(2);
  });

  it('of the angular momentum stands under the sum, and is not shown where nothing states one', () => {
    const total = { hx: 123.456, hy: 0.5, hz: -3.21 };
    const table = (sigma: typeof total | null) =>
      rows(<MomentumTable operatingPoint="Cruise" rotors={[]} total={total} sigma={sigma} />);
    const sure = { rotorsWithoutSigma: [], shaftsWithoutSigma: [] };
    const covariance = { xx: 0, yy: 0, zz: 0, xy: 0, xz: 0, yz: 0 };
    const known = statedSigma({ ...sure, covariance, sigma: [1.5, 0.25, 0] });
    expect(named(table(known), '± of all rotors')).toEqual(['', '1.50', '0.25', '0.00']);
    expect(named(table(known), 'All rotors')[1]).toBe('+123.46');
    expect(statedSigma({ ...sure, covariance, sigma: [0, 0, 0] })).toBeNull();
    expect(named(table(null), '± of all rotors')).toEqual([]);
  });

  it('of principal moments stands beside them', () => {
    const axes = [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ] as const;
    const found = rows(<PrincipalTable moments={[10, 20, 25]} axes={axes} sigma={[0.5, 0.7, 0.9]} />);
    expect(named(found, 'Nearest y').slice(0, 2)).toEqual(['20.00', '0.70']);
    expect(named(rows(<PrincipalTable moments={[10, 20, 25]} axes={axes} />), 'Nearest y')).toHaveLength(4);
  });

  it('is shown on a condition for mass, CG, moments, principal moments and radii, basic and predicted', () => {
    const frame = geometry({ mac: 2, lemac: [-1, 0, 0] });
    const placement = new Placement(declarations(), frame);
    const [book, uncertainty] = [new SubtotalBook(placement), new UncertaintyBook(placement)];
    for (const x of [1, -1, 2]) {
      const row = aComponent({
        mass: 40,
        position: [x, x * x, 0.2 * x],
        moments: diagonal([3, 4, 5], 40),
        sigma: sigmas({ mass: 0.4, x: 0.01, y: 0.02, z: 0.01, ixx: 2 }),
        growth: 0.05,
      });
      book.add(row);
      uncertainty.add(row);
    }
    const whole = rollUp(book.subtotals(), [], frame, NO_GROWTH);
    const { basic, predicted } = combineUncertainty(uncertainty.sums(), [], NO_GROWTH);
    const limits = { forward: null, aft: null, mass: null };
    const markup = renderToStaticMarkup(
      <ConditionResultView
        rollUp={whole}
        uncertainty={{
          basic: uncertaintyOf(basic, whole.basicAccount, frame),
          predicted: uncertaintyOf(predicted, whole.predictedAccount, frame),
        }}
        geometry={frame}
        limits={limits}
        units={SI}
      />,
    ).replace(/<[^>]*>/g, ' ');
    for (const words of ['± of the basic CG', '± of the predicted CG', '± of the basic radii'])
      expect(markup).toContain(words);
    // The mass and its prediction: 0.4 kg thrice, independent: 0.69 and 0.73 kg.
    expect(markup.replace(/\s+/g, '')).toMatch(/120\.00kg±0\.69126\.00kgpredicted,withgrowth±0\.73/);
  });
});
