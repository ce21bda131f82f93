import { type Factor } from '@/lib/units/table';

/**
 * An SI value as a person typed it in a file's unit (SI = typed * times / over): the fewest digits, from 14 up, that are read
 * back as the very same value; 17 digits where rounding leaves no such number.
 */
export function typedNumber(value: number, { times, over }: Factor): number {
  const exact = (value * over) / times + 0;
  for (const digits of [14, 15, 16]) {
    const typed = Number(exact.toPrecision(digits));
    if ((typed * times) / over === value) return typed;
  }
  return exact;
}
