import { Placement } from '@/lib/mass/place';
import { NO_GROWTH, rollUp } from '@/lib/mass/roll-up';
import { StatelessRollUp } from '@/lib/mass/stateless';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { UncertaintyBook } from '@/lib/mass/uncertainty/book';
import { type Vec3 } from '@/lib/numerics/vec3';
import { uncertainRows } from '@/tests/mass/uncertainty/support';
import {
  bookedAbout,
  elevenDecades,
  errors,
  randomRows,
  roundingOfCoordinates,
} from '@/tests/support/exact-roll-up';
import { declarations, geometry, properties } from '@/tests/support/mass';
import { randomNumbers } from '@/tests/support/random';

/*
 * How exact and how fast the roll-up is, at full size: masses from 1e-6 to 1e5 kg, 2 to 1e5 rows, against exact rational arithmetic.
 * Prints a table; ends with an error when a target of the accuracy tests is missed.
 */

const FAR: Vec3 = [1e4, -1e4, 1e4];
const TARGET = 1e-14;
const SEEDS = [3, 1967];
const SIZES = [2, 10, 100, 1000, 10000, 100000];

const short = (value: number): string => value.toExponential(1).padStart(9);

let missed = 0;
const hold = (value: number, limit: number): string => {
  if (!(value <= limit)) missed += 1;
  return `${short(value)}${value <= limit ? '' : ' MISSED'}`;
};

function accuracy(): void {
  console.log('\nRelative error of the tensor (Frobenius norm) and of the mass; largest of the seeds');
  console.log(
    '    rows  own tensors   near: tensor      mass   far: tensor  about the datum  rounding of input',
  );
  for (const count of SIZES)
    for (const points of [false, true]) {
      let [near, mass, far, datum, rounding] = [0, 0, 0, 0, Infinity];
      for (const seed of count > 10000 ? SEEDS.slice(0, 1) : SEEDS) {
        const rows = randomRows(count, seed, { ...elevenDecades, points });
        const off = errors(bookedAbout(rows, [1, 0.5, -0.5]), rows);
        [near, mass] = [Math.max(near, off.tensor), Math.max(mass, off.mass)];
        const moved = randomRows(count, seed, { ...elevenDecades, points, datum: FAR });
        const result = bookedAbout(moved, [FAR[0] + 1, FAR[1] + 0.5, FAR[2] - 0.5]);
        far = Math.max(far, errors(result, moved).tensor);
        datum = Math.max(datum, errors(bookedAbout(moved, [0, 0, 0]), moved).tensor);
        rounding = Math.min(rounding, Math.max(roundingOfCoordinates(moved, result), Number.EPSILON));
      }
      console.log(
        `${String(count).padStart(8)}  ${points ? 'none       ' : 'full       '}   ${hold(near, TARGET)} ${hold(mass, TARGET)}     ` +
          `${hold(far, rounding)}        ${hold(datum, rounding)}          ${short(rounding)}`,
      );
    }
}

function order(): void {
  const rows = randomRows(20000, 5, { ...elevenDecades, points: true }).map((row, i) => ({
    ...row,
    group: `G${i % 200}`,
  }));
  const frame = geometry({ reference: [1, 0.5, -0.5] });
  const booked = () => {
    const book = new SubtotalBook(new Placement(declarations(), frame));
    for (const row of rows) book.add(row);
    return book.subtotals();
  };
  const parts = booked();
  if (JSON.stringify(parts) !== JSON.stringify(booked())) missed += 1;
  const straight = properties(rollUp(parts, [], frame, NO_GROWTH).basic).tensor;
  const random = randomNumbers(7);
  let worst = 0;
  for (let round = 0; round < 50; round += 1) {
    const mixed = parts.map((part) => ({ part, key: random() })).sort((a, b) => a.key - b.key);
    const { tensor } = properties(
      rollUp(
        mixed.map(({ part }) => part),
        [],
        frame,
        NO_GROWTH,
      ).basic,
    );
    for (const key of ['xx', 'yy', 'zz'] as const)
      worst = Math.max(worst, Math.abs(tensor[key] / straight[key] - 1));
  }
  console.log(`\n200 subtotals in 50 random orders: largest relative difference ${hold(worst, TARGET)}`);
}

function speed(): void {
  const rows = uncertainRows(2000, 3);
  const frame = geometry({ reference: [1, 2, 3] });
  const measure = (what: string, booking: () => { add(row: (typeof rows)[number]): void }): void => {
    let best = Infinity;
    for (let round = 0; round < 8; round += 1) {
      const book = booking();
      const start = process.cpuUsage();
      for (let k = 0; k < 25; k += 1) for (const row of rows) book.add(row);
      const { user, system } = process.cpuUsage(start);
      best = Math.min(best, user + system);
    }
    console.log(
      `${what}: ${Math.round((rows.length * 25) / best / 1e-3).toLocaleString('en')} thousand rows a second of CPU`,
    );
  };
  measure('Subtotals', () => new SubtotalBook(new Placement(declarations(), frame)));
  measure('Uncertainty, eight σ a row', () => new UncertaintyBook(new Placement(declarations(), frame)));
  measure('Both, stateless', () => new StatelessRollUp(declarations()));
}

speed();
accuracy();
order();
if (missed > 0) {
  console.error(`\n${missed} targets missed.`);
  process.exitCode = 1;
}
