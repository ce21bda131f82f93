import { ASK_THE_TEXT, NAMES_NO_SIDE, NAMES_RIGHT } from '../columns/side-in-bytes';
import { TRAITS } from '../columns/traits';
import { type RowFacts } from '../row-facts';
import { type RowRule, type Watch } from '../rule';
import { FIRST_ROWS, Seen, counted, eachRow, inUnit } from '../watch';

/** Nearer to the plane of symmetry than this, m, a CG may lie on either side of it. */
const NEAR_PLANE = 0.02;
/** From this share of the rows that name a side on, with at least `FEWEST` of them, it is the axes and not the rows. */
const MOST = 0.8;
const FEWEST = 4;

function isWrong(row: RowFacts): boolean | null {
  if (!row.isCounted || row.isMirrored || row.side === null || Math.abs(row.right) <= NEAR_PLANE) return null;
  return row.side === 'right' ? row.right < 0 : row.right > 0;
}

function isTheAxes(wrong: number, judged: number): boolean {
  return judged >= FEWEST && wrong >= MOST * judged;
}

function where(row: RowFacts): string {
  const side = row.right > 0 ? 'right' : 'left';
  const away = inUnit(Math.abs(row.right), row.declarations.lengthUnit);
  return `“${row.name}” lies ${away} to the ${side} of the plane of symmetry`;
}

function watchSides(report: (seen: Seen, judged: number) => ReturnType<Watch['report']>): Watch {
  const seen = new Seen();
  let judged = 0;
  const see = (row: RowFacts): void => {
    const wrong = isWrong(row);
    if (wrong === null) return;
    judged += 1;
    if (wrong) seen.add(row.component.item, where(row));
  };
  return {
    see,
    block: ({ rows, counted: isCounted, isMirrored, side, right, facts }) => {
      for (let row = 0; row < rows.rows; row += 1) {
        const told = side[row] ?? NAMES_NO_SIDE;
        if (told === NAMES_NO_SIDE || isCounted[row] === 0 || isMirrored[row] === 1) continue;
        const away = right[row] ?? NaN;
        if (Math.abs(away) <= NEAR_PLANE) continue;
        if (told !== ASK_THE_TEXT && away > 0 === (told === NAMES_RIGHT)) judged += 1;
        else see(facts(row));
      }
    },
    report: () => report(seen, judged),
  };
}

export const axesMirrored: RowRule = {
  id: 'axes-mirrored',
  severity: 'warning',
  sees: 'A list in which at least 80 % of the rows that are called left lie right, or the other way round.',
  why: 'Its butt lines probably count to the other side than declared, which makes a left-handed list right-handed or the reverse: every lateral place and two of the products have the wrong sign.',
  remedy: 'Check the axis directions that the list declares, left against right.',
  source: 'Common practice, no source',
  keeps: FIRST_ROWS,
  watch: () =>
    watchSides((seen, judged) =>
      isTheAxes(seen.count, judged)
        ? seen.report(
            (count) => `${count} of ${judged} rows that name a side lie on the other one: check the axes`,
          )
        : null,
    ),
};

export const sideAgainstName: RowRule = {
  id: 'side-against-name',
  severity: 'warning',
  sees: 'A counted row that is called left (LH) and whose CG is more than 20 mm to the right, or the other way round.',
  why: 'The sign of its butt line is probably wrong, which moves its mass by twice its distance and turns two of its products.',
  remedy: 'Check the sign of the lateral coordinate against the drawing, or mend the name.',
  source: 'Common practice, no source',
  keeps: FIRST_ROWS,
  watch: () =>
    watchSides((seen, judged) =>
      isTheAxes(seen.count, judged)
        ? null
        : seen.report((count) =>
            counted(
              count,
              'row lies on the other side than its name says',
              'rows lie on the other side than their names say',
            ),
          ),
    ),
};

export const halfOnOtherSide: RowRule = {
  id: 'half-on-other-side',
  severity: 'note',
  sees: 'A list of the left half whose mass lies right of the plane of symmetry, or the other way round.',
  why: 'Each row stands for both sides, so the total does not change; but the half, the axes or the signs are not what the list says.',
  remedy: 'Check the extent and the axis directions that the list declares.',
  source: 'First principles',
  keeps: 'The sum of the mass and of its first moment across the plane of symmetry.',
  watch: ({ placement: { declarations } }) => {
    let mass = 0;
    let moment = 0;
    return {
      see: (row) => {
        if (!row.isCounted) return;
        mass += row.totalMass;
        moment += row.totalMass * row.right;
      },
      block: ({ rows, counted: isCounted, total, right }) => {
        if (declarations.extent === 'whole') return;
        for (let row = 0; row < rows.rows; row += 1) {
          if (isCounted[row] === 0) continue;
          mass += total[row] ?? NaN;
          moment += (total[row] ?? NaN) * (right[row] ?? NaN);
        }
      },
      report: () => {
        const { extent, lengthUnit } = declarations;
        if (extent === 'whole' || mass <= 0) return null;
        const right = moment / mass;
        if (extent === 'right-half' ? right >= 0 : right <= 0) return null;
        return {
          message: `The list of the ${extent === 'right-half' ? 'right' : 'left'} half has its CG ${inUnit(Math.abs(right), lengthUnit)} to the ${right > 0 ? 'right' : 'left'} of the plane of symmetry.`,
          rows: [],
          count: 1,
        };
      },
    };
  },
};

/** A CG nearer to the plane than this, m, is on it. */
export const ON_PLANE = 5e-4;

export const mirroredOnPlane: RowRule = {
  id: 'mirrored-on-plane',
  severity: 'warning',
  sees: 'A counted row that also stands for its mirror image and has its CG on the plane of symmetry.',
  why: 'Row and image are in one place: a single part in the middle is counted twice.',
  remedy:
    'Clear the symmetry column, or move the row from the half list to a whole one; where there are two parts, give the place of one of them.',
  source: 'First principles',
  keeps: FIRST_ROWS,
  watch: eachRow(
    (row) =>
      row.isCounted && row.isMirrored && row.component.mass !== 0 && Math.abs(row.right) < ON_PLANE
        ? `“${row.name}”, ${inUnit(row.component.mass, row.declarations.massUnit)}, counts twice on the plane of symmetry`
        : null,
    (count) => counted(count, 'row in the middle is mirrored', 'rows in the middle are mirrored'),
    { traits: TRAITS.onPlane },
  ),
};
