/** How many groups have a colour of their own: Okabe and Ito's eight without the yellow, which paper does not carry. */
export const SERIES = 7;

/** The group that items on board stand in; no list has it, for blanks around a path are dropped when it is read. */
export const ON_BOARD = ' on board';

/** What stands for them among the codes of lists in an address; a code has no point. */
export const ON_BOARD_LIST = '.on-board';

/** How the marks of one top group are told apart. */
export interface GroupKey {
  /** First level of the group paths. */
  readonly group: string;
  readonly title: string;
  /** One or two characters, no two alike. */
  readonly letter: string;
  /** 1 to SERIES; null: plain, by its letter alone. */
  readonly series: number | null;
  /** kg, all pieces. */
  readonly mass: number;
}

export const topGroup = (path: string): string => path.split('/')[0] ?? path;

/**
 * Letters and colours of top groups. Colours go to the heaviest, in this order; letters are a capital from the name, or a number when
 * all its letters are taken.
 */
export function groupKeys(masses: ReadonlyMap<string, number>): GroupKey[] {
  const heaviest = [...masses].sort(
    ([a, p], [b, q]) => Math.abs(q) - Math.abs(p) || (a < b ? -1 : a > b ? 1 : 0),
  );
  const taken = new Set<string>();
  return heaviest.map(([group, mass], index) => {
    const letter = freeLetter(group, taken);
    taken.add(letter);
    return { group, title: group, letter, series: index < SERIES ? index + 1 : null, mass };
  });
}

function freeLetter(name: string, taken: ReadonlySet<string>): string {
  const letters = [...name.toUpperCase()].filter((each) => /\p{L}/u.test(each));
  const letter = letters.find((each) => !taken.has(each));
  if (letter !== undefined) return letter;
  for (let number = 1; ; number += 1) if (!taken.has(String(number))) return String(number);
}
