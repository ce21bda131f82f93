import { TRAITS } from '../columns/traits';
import { type RowFacts } from '../row-facts';
import { type RowRule, type Watch, type WatchedList } from '../rule';
import { FIRST_ROWS, Seen, counted, eachRow, eachWith, inUnit, shown } from '../watch';

/** A watch on the rows for which `is` holds, which says what share of the list's mass they are. */
function shareOfMass(
  is: (row: RowFacts) => boolean,
  headline: (count: number) => string,
  trait: number,
): (list: WatchedList) => Watch {
  return ({ placement: { declarations } }) => {
    const seen = new Seen();
    let [all, some] = [0, 0];
    return {
      block: ({ rows, counted: isCounted, total, traits, facts }) => {
        for (let row = 0; row < rows.rows; row += 1) {
          if (isCounted[row] === 0) continue;
          const mass = Math.abs(total[row] ?? NaN);
          all += mass;
          if (((traits[row] ?? 0) & trait) === 0) continue;
          some += mass;
          if (seen.isFull) seen.count += 1;
          else seen.add(facts(row).component.item, inUnit(total[row] ?? NaN, declarations.massUnit));
        }
      },
      see: (row) => {
        if (!row.isCounted) return;
        const mass = Math.abs(row.totalMass);
        all += mass;
        if (!is(row)) return;
        some += mass;
        seen.add(row.component.item, inUnit(row.totalMass, declarations.massUnit));
      },
      report: () =>
        seen.report((count) => {
          const share = all === 0 ? 0 : (100 * some) / all;
          return `${headline(count)}: ${inUnit(some, declarations.massUnit)}, ${shown(share)} % of the list`;
        }),
    };
  };
}

const KEEPS = `${FIRST_ROWS} Two sums of mass.`;
const PRACTICE = 'Common practice, no source';

export const withoutMaturity: RowRule = {
  id: 'no-maturity',
  severity: 'note',
  sees: 'Counted rows that state no maturity (E, C or A).',
  why: 'Nobody can tell whether their mass was estimated, calculated or weighed, and the program’s growth allowance does not reach them.',
  remedy: 'State the maturity of each row.',
  source: PRACTICE,
  keeps: KEEPS,
  watch: shareOfMass(
    ({ component }) => component.maturity === null,
    (count) => counted(count, 'row states no maturity', 'rows state no maturity'),
    TRAITS.noMaturity,
  ),
};

export const withoutGroup: RowRule = {
  id: 'no-group',
  severity: 'note',
  sees: 'Counted rows that state no group.',
  why: 'They stand in no group’s total and are judged against no neighbours.',
  remedy: 'State the group of each row.',
  source: PRACTICE,
  keeps: KEEPS,
  watch: shareOfMass(
    ({ component }) => component.group === 'Ungrouped',
    (count) => counted(count, 'row states no group', 'rows state no group'),
    TRAITS.noGroup,
  ),
};

export const actualWithGrowth: RowRule = {
  id: 'actual-with-growth',
  severity: 'note',
  sees: 'A counted row that is weighed (A) and states growth of its own above zero.',
  why: 'What was weighed grows only by changes still to come. Growth beyond that is counted on top of a mass that already holds it.',
  remedy: 'Set growth_percent to 0, or leave it blank for the program’s allowance, or correct the maturity.',
  source: PRACTICE,
  keeps: FIRST_ROWS,
  watch: eachRow(
    ({ isCounted, component: { maturity, growth } }) =>
      isCounted && maturity === 'A' && growth !== null && growth > 0
        ? `growth ${shown(100 * growth)} %`
        : null,
    (count) => counted(count, 'weighed row states growth', 'weighed rows state growth'),
    { traits: TRAITS.grownActual, isAll: true },
  ),
};

export const estimatedWithoutGrowth: RowRule = {
  id: 'estimated-without-growth',
  severity: 'note',
  sees: 'A counted row that is estimated (E) and states a growth of zero or less.',
  why: 'Estimates grow. Its predicted mass is no larger than its estimate, whatever the program allows.',
  remedy: 'Leave growth_percent blank for the program’s allowance, or state the growth to expect.',
  source: PRACTICE,
  keeps: FIRST_ROWS,
  watch: eachRow(
    ({ isCounted, component: { maturity, growth, mass }, declarations }) =>
      isCounted && maturity === 'E' && growth !== null && growth <= 0
        ? `${inUnit(mass, declarations.massUnit)}, growth ${shown(100 * growth)} %`
        : null,
    (count) => counted(count, 'estimated row states no growth', 'estimated rows state no growth'),
    { traits: TRAITS.ungrownEstimate, isAll: true },
  ),
};

export const sigmaBeyondValue: RowRule = {
  id: 'sigma-beyond-value',
  severity: 'warning',
  sees: 'A counted row whose one standard deviation of mass, or of a moment of inertia, is larger than the value itself.',
  why: 'Such a figure says almost nothing: a σ in the wrong column or unit, or a percentage taken for a value.',
  remedy:
    'Check the σ columns, their unit and what the list declares its figures to be (1σ, 2σ, 3σ, half-width).',
  source: 'Common practice, no source; σ as JCGM 100:2008, 4.2.2',
  keeps: FIRST_ROWS,
  watch: eachRow(
    ({ isCounted, component: { mass, moments, sigma }, declarations }) => {
      if (!isCounted || sigma === null) return null;
      const { massUnit, inertiaUnit } = declarations;
      if (sigma.mass !== null && mass !== 0 && sigma.mass > Math.abs(mass))
        return `mass ${inUnit(mass, massUnit)}, σ ${inUnit(sigma.mass, massUnit)}`;
      for (const key of ['ixx', 'iyy', 'izz'] as const) {
        const own = sigma[key];
        if (own === null || moments[key] === 0 || own <= Math.abs(moments[key])) continue;
        return `${key} ${inUnit(moments[key], inertiaUnit)}, σ ${inUnit(own, inertiaUnit)}`;
      }
      return null;
    },
    (count) =>
      counted(
        count,
        'row has a σ larger than its value',
        'rows have a σ larger than the value it belongs to',
      ),
    { traits: TRAITS.vague },
  ),
};

export const adjustmentsLeftOut: RowRule = {
  id: 'adjustments-left-out',
  severity: 'note',
  sees: 'Rows of a list of adjustments that are pending or potential.',
  why: 'A submission takes approved adjustments only: these are in no result.',
  remedy: 'Have them approved before submitting, or submit without them and say so.',
  source: PRACTICE,
  keeps: `${FIRST_ROWS} The sum of their mass.`,
  watch: ({ placement: { declarations } }) => {
    const seen = new Seen();
    let mass = 0;
    const see = (row: RowFacts): void => {
      const { status, changeRef } = row.component;
      if (!row.isCounted || status === 'approved') return;
      mass += row.totalMass;
      const change = changeRef === null ? '' : `, change ${changeRef}`;
      seen.add(row.component.item, `${status}, ${inUnit(row.totalMass, declarations.massUnit)}${change}`);
    };
    return {
      see,
      block: (block) => eachWith(TRAITS.waiting, block, (row) => see(block.facts(row))),
      report: () =>
        seen.report((count) => {
          const headline = counted(count, 'adjustment is left out', 'adjustments are left out');
          return `${headline}, ${inUnit(mass, declarations.massUnit)} in sum`;
        }),
    };
  },
};
