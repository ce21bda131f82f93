import { type Category } from '@/lib/mass/component';

/** What the categories of contract section 1 are called on screens. */
export const CATEGORY_WORDS: Readonly<Record<Category, string>> = {
  empty: 'Empty aircraft',
  operating: 'Operating items',
  payload: 'Payload',
  fuel: 'Fuel',
  expendable: 'Expendables',
  ballast: 'Ballast',
};
