/** A mark on a sheet: centre from the upper left corner, m. */
export interface Mark {
  readonly x: number;
  readonly y: number;
  readonly radius: number;
  readonly shape: 'circle' | 'square';
  /** What it is drawn as: a class of marks that look alike. */
  readonly look: string;
}

export interface Outline {
  readonly look: string;
  /** The largest radius in it, m. */
  readonly radius: number;
  /** SVG path data, a closed outline for each mark. */
  readonly d: string;
}

/** Each band's largest radius as a share of the one before. */
const BAND = Math.SQRT1_2;

/**
 * Marks as a few paths, large ones first, so that small ones lie on top of them. `least` is the radius below which a mark is drawn as
 * a dot of that radius.
 */
export function outlinesOf(marks: readonly Mark[], least: number): Outline[] {
  const largest = marks.reduce((most, { radius }) => Math.max(most, radius), least);
  const bands = new Map<string, { readonly band: number; readonly look: string; readonly parts: string[] }>();
  for (const mark of marks) {
    const radius = Math.max(least, mark.radius);
    const band = largest === 0 ? 0 : Math.floor(Math.log(radius / largest) / Math.log(BAND) + 1e-9);
    const key = `${band} ${mark.look}`;
    const entry = bands.get(key) ?? { band, look: mark.look, parts: [] };
    bands.set(key, entry);
    entry.parts.push(mark.shape === 'circle' ? circle(mark, radius) : square(mark, radius));
  }
  return [...bands.values()]
    .sort((a, b) => a.band - b.band || (a.look < b.look ? -1 : a.look > b.look ? 1 : 0))
    .map(({ band, look, parts }) => ({ look, radius: largest * BAND ** band, d: parts.join('') }));
}

/** Millimetres on the aircraft: far below a pixel. */
const text = (value: number): string => String(Math.round(value * 1000) / 1000 + 0);

function circle({ x, y }: Mark, radius: number): string {
  const r = text(radius);
  return `M${text(x - radius)} ${text(y)}a${r} ${r} 0 1 0 ${text(2 * radius)} 0a${r} ${r} 0 1 0 ${text(-2 * radius)} 0z`;
}

/** Of the same area as the circle of that radius. */
function square({ x, y }: Mark, radius: number): string {
  const side = radius * Math.sqrt(Math.PI);
  return `M${text(x - side / 2)} ${text(y - side / 2)}h${text(side)}v${text(side)}h${text(-side)}z`;
}
