import { expect, it } from 'vitest';
import { offsetOf } from '@/lib/contracts/list-rows';

it('reads where a page begins as a whole number that the database can count to', () => {
  expect([null, '', '200', '7.9', '-5', 'x'].map(offsetOf)).toEqual([0, 0, 200, 7, 0, 0]);
  expect(offsetOf('99999999999999999999')).toBeLessThan(2 ** 31);
  expect(offsetOf('Infinity')).toBeLessThan(2 ** 31);
});
