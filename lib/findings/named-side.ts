export type Side = 'left' | 'right';

const LEFT = /(?:^|[^a-z])(?:left|lh)(?![a-z])/i;
const RIGHT = /(?:^|[^a-z])(?:right|rh)(?![a-z])/i;
const ANY = /left|right|lh|rh/i;
/** Where the words say no side of the aircraft. */
const OTHER_SENSE =
  /(?:left|right|lh|rh)[- ]?(?:hand(?:ed)?)?[- ](?:thread|screw|helix)\w*|right[- ]angled?|left[- ]?over/gi;

/** The side of the aircraft that a name tells, `left`, `LH`, `right` or `RH` as words of their own; null for none or both. */
export function namedSide(name: string): Side | null {
  if (!ANY.test(name)) return null;
  const plain = name.replace(OTHER_SENSE, ' ');
  const [left, right] = [LEFT.test(plain), RIGHT.test(plain)];
  if (left === right) return null;
  return left ? 'left' : 'right';
}

/** The name without its side, in small letters: the same for both of a pair. */
export function withoutSide(name: string): string {
  return name
    .toLowerCase()
    .replace(/(^|[^a-z])(?:left|right|lh|rh)(?![a-z])/g, '$1')
    .replace(/\s+/g, ' ')
    .trim();
}
