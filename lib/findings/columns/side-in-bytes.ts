/** What a name in bytes tells of the side of its row; `ASK_THE_TEXT` where `namedSide` of the text has to say. */
export const NAMES_NO_SIDE = 0;
export const NAMES_LEFT = 1;
export const NAMES_RIGHT = 2;
export const ASK_THE_TEXT = 3;

const LOWER = 32;
const L = 108;
const R = 114;
const H = 104;
const T = 116;

function isLetter(byte: number): boolean {
  const lower = byte | LOWER;
  return lower >= 97 && lower <= 122;
}

/** Letters with which, after a side's name, `namedSide` may see another sense: hand, thread, screw, angle, over, another name. */
const letters = (text: string): Uint8Array =>
  Uint8Array.from({ length: 256 }, (_, byte) => (text.includes(String.fromCharCode(byte | LOWER)) ? 1 : 0));
const AFTER_LEFT = letters('htso');
const AFTER_RIGHT = letters('htsa');
const AFTER_HAND = letters('hts');
const JOINED = letters('holr');

/**
 * The same as `namedSide` of the text, for a range of `RowBlock`. Words of five letters at most have to be found, each ending in h or t,
 * so that most bytes are looked at once. Letters are those of ASCII, as there.
 */
export function sideInBytes(bytes: Uint8Array, start: number, end: number): number {
  if (end < 0) return ASK_THE_TEXT;
  let found = NAMES_NO_SIDE;
  for (let at = start + 1; at < end; at += 1) {
    const lower = (bytes[at] ?? 0) | LOWER;
    if (lower !== H && lower !== T) continue;
    const from = beginOfWord(bytes, start, at);
    if (from === -1) continue;
    if (at + 1 < end) {
      const next = bytes[at + 1] ?? 0;
      if (JOINED[next] === 1) return ASK_THE_TEXT;
      if (isLetter(next)) continue;
      if ((next === 32 || next === 45) && at + 2 < end) {
        const others = lower === H ? AFTER_HAND : at - from === 3 ? AFTER_LEFT : AFTER_RIGHT;
        if (others[bytes[at + 2] ?? 0] === 1) return ASK_THE_TEXT;
      }
    }
    if (from > start && isLetter(bytes[from - 1] ?? 0)) continue;
    found |= ((bytes[from] ?? 0) | LOWER) === L ? NAMES_LEFT : NAMES_RIGHT;
  }
  return found === (NAMES_LEFT | NAMES_RIGHT) ? NAMES_NO_SIDE : found;
}

const LEFT = [L, 101, 102, T];
const RIGHT = [R, 105, 103, H, T];

/** Where lh, rh, left or right begins that ends here; -1 where none does. */
function beginOfWord(bytes: Uint8Array, start: number, at: number): number {
  const before = (bytes[at - 1] ?? 0) | LOWER;
  if (((bytes[at] ?? 0) | LOWER) === H) return before === L || before === R ? at - 1 : -1;
  const word = before === H ? RIGHT : LEFT;
  const from = at - word.length + 1;
  if (from < start) return -1;
  for (let k = 0; k < word.length; k += 1) if (((bytes[from + k] ?? 0) | LOWER) !== word[k]) return -1;
  return from;
}
