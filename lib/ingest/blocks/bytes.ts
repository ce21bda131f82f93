/** Bytes that mean something in CSV and in numbers. */
export const TAB = 9;
export const NEWLINE = 10;
export const RETURN = 13;
export const QUOTE = 34;
export const APOSTROPHE = 39;
export const PLUS = 43;
export const COMMA = 44;
export const MINUS = 45;
export const POINT = 46;
export const ZERO = 48;
export const NINE = 57;
export const SEMICOLON = 59;
export const UPPER_E = 69;
export const LOWER_E = 101;

/** Whether bytes are the very ones of a text. */
export function isSame(text: Uint8Array, bytes: Uint8Array, start: number, end: number): boolean {
  const length = end - start;
  if (text.length !== length) return false;
  // From the end: texts of one kind begin alike.
  for (let k = length - 1; k >= 0; k -= 1) if (text[k] !== bytes[start + k]) return false;
  return true;
}
