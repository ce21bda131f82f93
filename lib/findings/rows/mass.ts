import { fromSi } from '@/lib/units/convert';
import { type MassUnit } from '@/lib/units/table';

import { TRAITS } from '../columns/traits';
import { type RowRule } from '../rule';
import { FIRST_ROWS, counted, eachRow, shown } from '../watch';

export const masslessTensor: RowRule = {
  id: 'massless-tensor',
  severity: 'blocker',
  sees: 'A counted row with zero mass and moments of its own.',
  why: 'Nothing without mass has inertia: the mass is missing, or the moments belong to another row.',
  remedy: 'Give the mass, or set the moments to zero.',
  source: 'First principles: tr S = ∫ρ² dm is zero where there is no mass',
  keeps: FIRST_ROWS,
  watch: eachRow(
    (row) =>
      row.isCounted && row.component.mass === 0 && row.hasOwnMoments ? 'zero mass, moments not zero' : null,
    (count) => counted(count, 'row has moments and no mass', 'rows have moments and no mass'),
    { traits: TRAITS.massless },
  ),
};

export const masslessRow: RowRule = {
  id: 'massless-row',
  severity: 'note',
  sees: 'A counted row with zero mass and zero moments.',
  why: 'It adds nothing to any result; often it waits for a figure.',
  remedy: 'Give the mass when it is known, or make it a memo row.',
  source: 'Common practice, no source',
  keeps: FIRST_ROWS,
  watch: eachRow(
    (row) => (row.isCounted && row.component.mass === 0 && !row.hasOwnMoments ? 'zero mass' : null),
    (count) => counted(count, 'row has no mass', 'rows have no mass'),
    { traits: TRAITS.massless },
  ),
};

export const negativeMassOutsideAdjustments: RowRule = {
  id: 'negative-mass-in-components',
  severity: 'warning',
  sees: 'A row with negative mass in a list of components.',
  why: 'What is taken away belongs in a list of adjustments, where it carries a change reference and a status.',
  remedy: 'Move the row to a list of kind adjustments, or mend the sign.',
  source: 'Common practice, no source',
  keeps: FIRST_ROWS,
  watch: eachRow(
    ({ component, declarations }) =>
      component.mass < 0 && declarations.kind === 'components'
        ? `mass ${shown(fromSi(component.mass, declarations.massUnit))} ${declarations.massUnit}`
        : null,
    (count) =>
      counted(
        count,
        'row of a component list has negative mass',
        'rows of a component list have negative mass',
      ),
    { traits: TRAITS.negative },
  ),
};

/** At most 1 / HEAVY_SHARE rows can be heavy, so the watch below forgets none of them. */
const HEAVY_SHARE = 0.005;
const KEPT_ROWS = 2 / HEAVY_SHARE;

export const heavyPoint: RowRule = {
  id: 'heavy-point',
  severity: 'warning',
  sees: 'A counted row that holds at least 0.5 % of the mass of its list and states no moments of its own.',
  why: 'It is rolled up as a point: the larger the part, the more of its own inertia is missing from the total.',
  remedy:
    'Give the moments about its own CG, from the drawing or from a box of its size; or split the row into its parts.',
  source: 'Common practice, no source',
  keeps: `The sum of the masses and at most ${KEPT_ROWS} rows that are heavy against what has been summed so far.`,
  watch: () => {
    let sum = 0;
    let heavy: { readonly item: string; readonly mass: number }[] = [];
    let unit: MassUnit = 'kg';
    const stillHeavy = (): typeof heavy => heavy.filter(({ mass }) => mass >= HEAVY_SHARE * sum);
    const keep = (item: string, mass: number): void => {
      heavy.push({ item, mass });
      if (heavy.length > KEPT_ROWS) heavy = stillHeavy();
    };
    return {
      see: (row) => {
        if (!row.isCounted) return;
        // Absolute values, so that the sum only grows and a row once light stays light.
        const mass = Math.abs(row.totalMass);
        sum += mass;
        unit = row.declarations.massUnit;
        if (row.hasOwnMoments || mass === 0 || mass < HEAVY_SHARE * sum) return;
        keep(row.component.item, mass);
      },
      block: ({ rows, counted: isCounted, total, placement, facts }) => {
        unit = placement.declarations.massUnit;
        for (let row = 0; row < rows.rows; row += 1) {
          if (isCounted[row] === 0) continue;
          const mass = Math.abs(total[row] ?? NaN);
          sum += mass;
          if (rows.hasMoments[row] === 1 || mass === 0 || mass < HEAVY_SHARE * sum) continue;
          keep(facts(row).component.item, mass);
        }
      },
      report: () => {
        const found = stillHeavy().sort((a, b) => b.mass - a.mass);
        const [heaviest] = found;
        if (heaviest === undefined) return null;
        const headline = counted(
          found.length,
          'heavy row states no moments of its own',
          'heavy rows state no moments of their own',
        );
        return {
          message: `${headline}. Heaviest, ${heaviest.item}: ${shown(fromSi(heaviest.mass, unit))} ${unit}, ${shown((100 * heaviest.mass) / sum)} % of the list.`,
          rows: found.map(({ item }) => item),
          count: found.length,
        };
      },
    };
  },
};
