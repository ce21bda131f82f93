import { CATEGORIES, type Category } from '@/lib/mass/component';
import { rangeOf, rangeText } from '@/lib/three-views/region';
import { askedSystem } from '@/lib/units/choice';
import { type UnitSystem } from '@/lib/units/names';

/** What a reader chose of the three views, all of it in the address; the region too, which the page keeps as it finds it. */
export interface ViewsAddress {
  readonly condition: string | null;
  readonly units: UnitSystem;
  readonly points: boolean;
  /** A list's code, or ON_BOARD_LIST. */
  readonly list: string | null;
  /** A group path. */
  readonly within: string;
  readonly category: Category | null;
  /** x, y, z as `from..to`, m. */
  readonly region: readonly [string | null, string | null, string | null];
}

type Asked = Readonly<Record<string, string | string[] | undefined>>;

export function viewsAsked(asked: Asked): ViewsAddress {
  const text = (name: string): string | null => {
    const value = asked[name];
    return typeof value === 'string' && value !== '' ? value : null;
  };
  const range = (name: string): string | null => rangeText(rangeOf(text(name)));
  return {
    condition: text('condition'),
    units: askedSystem(asked['units']),
    points: asked['points'] !== 'hidden',
    list: text('list'),
    within: text('within') ?? '',
    category: CATEGORIES.find((one) => one === asked['category']) ?? null,
    region: [range('x'), range('y'), range('z')],
  };
}

/** The address as fields of a query; what is as at first leaves no trace. */
export function viewsFields(view: ViewsAddress): Readonly<Record<string, string>> {
  const [x, y, z] = view.region;
  const fields = {
    condition: view.condition,
    units: view.units === 'us' ? 'us' : null,
    points: view.points ? null : 'hidden',
    list: view.list,
    within: view.within,
    category: view.category,
    x,
    y,
    z,
  };
  return Object.fromEntries(
    Object.entries(fields).flatMap(([name, value]) =>
      value === null || value === '' ? [] : [[name, value]],
    ),
  );
}

export function viewsHref(path: string, view: ViewsAddress): string {
  const query = new URLSearchParams(viewsFields(view)).toString();
  return query === '' ? path : `${path}?${query}`;
}
