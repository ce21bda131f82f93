import { type Account, fromNumbers } from '@/lib/mass/account';
import { type Part } from '@/lib/mass/contributions/effects';
import { type NameOfTen, TEN } from '@/lib/mass/contributions/ten';
import { type AirframeGeometry } from '@/lib/mass/geometry';

/** What the parts are: rows and items on board; groups by their path; or first-level groups with all that is below them. */
export const BY = ['rows', 'groups', 'branches'] as const;
export type By = (typeof BY)[number];

/** A part as it travels: its accounts about r0 as plain numbers, ten or twenty of each. */
export interface DriverPart {
  /** Tells it from every other part of the same kind; stands in the address. */
  readonly key: string;
  readonly name: string;
  readonly description: string | null;
  /** Group path of a row; null for a group or an item on board. */
  readonly group: string | null;
  /** The list and revision that a row stands in. */
  readonly list: { readonly code: string; readonly revision: number } | null;
  /** Rows of a group; 1 otherwise. */
  readonly rows: number;
  readonly pieces: readonly number[];
  readonly image: readonly number[] | null;
}

/** The parts of a whole that contribute most to one of its ten numbers. */
export interface Drivers {
  readonly number: NameOfTen;
  readonly by: By;
  readonly geometry: AirframeGeometry;
  /** The account of everything, about r0. */
  readonly whole: readonly number[];
  /** Largest first, without regard to sign. */
  readonly parts: readonly DriverPart[];
  /** How many parts there are, those left out too. */
  readonly of: number;
  /** The sum of all their contributions to that number, those left out too, and of the same without signs. */
  readonly sum: number;
  readonly gross: number;
}

/** @throws RangeError unless the numbers are those of accounts. */
export function partOf({ pieces, image }: Pick<DriverPart, 'pieces' | 'image'>): Part {
  return { pieces: fromNumbers(pieces), image: image === null ? null : fromNumbers(image) };
}

export function wholeAccount({ whole }: Pick<Drivers, 'whole'>): Account {
  return fromNumbers(whole);
}

export interface DriversAsked {
  readonly number: NameOfTen;
  readonly by: By;
}

type Asked = Readonly<Record<string, string | readonly string[] | undefined>>;

/** What an address asks for (`number=ixz`, `by=groups`); mass by rows where it says nothing that is known. */
export function driversAsked(asked: Asked): DriversAsked {
  return {
    number: TEN.find((name) => name === asked['number']) ?? 'mass',
    by: BY.find((by) => by === asked['by']) ?? 'rows',
  };
}

/** Writes it into an address; what is as at first leaves no trace. */
export function withDrivers(query: URLSearchParams, { number, by }: DriversAsked): URLSearchParams {
  if (number !== 'mass') query.set('number', number);
  if (by !== 'rows') query.set('by', by);
  return query;
}
