import { type ColumnUnit, looksLikeUnit, unitOf } from './unit-words';

/** A heading taken apart: "Own Ixx, slug ft2" is the name "own ixx" in slug.ft2. */
export interface Heading {
  /** Lower case, letters and digits with single blanks. */
  readonly name: string;
  readonly unit: ColumnUnit | null;
  /** Text that stands where a unit does and is none that is known: asked about, never passed over. */
  readonly unknownUnit: string | null;
}

const BRACKETED = /[[({<]([^\])}>]*)[\])}>]/gu;

/** The name and the unit of a heading. A unit stands in brackets, after a comma, a slash or "in", or as the last word. */
export function readHeading(text: string): Heading {
  const shown = text.replace(/\s+/gu, ' ').trim();
  let unknown: string | null = null;
  for (const [whole, inside = ''] of shown.matchAll(BRACKETED)) {
    const unit = unitOf(inside);
    if (unit !== null) return { name: nameOf(shown.replace(whole, ' ')), unit, unknownUnit: null };
    if (looksLikeUnit(inside) && !isNamePart(inside)) unknown ??= inside.trim();
  }
  const bare = shown.replace(BRACKETED, ' ').trim();
  for (const apart of [/^(.+?)\s*[,;:/|]\s*([^,;:/|]+)$/u, /^(.+?)\s+in\s+(.+)$/iu]) {
    const found = apart.exec(bare);
    const unit = found === null ? null : unitOf(found[2] ?? '');
    if (found !== null && unit !== null) return { name: nameOf(found[1] ?? ''), unit, unknownUnit: null };
  }
  const words = bare.split(/[\s_]+/u);
  for (let from = Math.max(1, words.length - 3); from < words.length; from += 1) {
    const unit = unitOf(words.slice(from).join(' '));
    if (unit !== null) return { name: nameOf(words.slice(0, from).join(' ')), unit, unknownUnit: null };
  }
  return { name: nameOf(unknown === null ? shown : bare), unit: null, unknownUnit: unknown };
}

/** Headings are the same to a person whatever their case, blanks and line breaks. */
export function nameOf(text: string): string {
  return text
    .toLowerCase()
    .normalize('NFKC')
    .replace(/#/gu, ' no ')
    .replace(/σ/gu, ' sigma ')
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim();
}

/** Short words in brackets that say which, not in what: "CG (x)", "Mass (each)", "Ixx (own)". */
function isNamePart(text: string): boolean {
  return /^(?:[xyz]|[ijp]?[xyz]{2}|[eca]|e\/c\/a|each|total|own|cg|cog|unit|off|no|id|max|min|nom|est|calc|act|lh|rh|l\/r|l|r)$/iu.test(
    text.trim(),
  );
}
