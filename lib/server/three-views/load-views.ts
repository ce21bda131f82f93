import { ON_BOARD, ON_BOARD_LIST } from '@/lib/three-views/group-key';
import { type Db } from '@/db/client';
import { type Category } from '@/lib/mass/component';
import { type Picture } from '@/lib/three-views/picture';
import { loadPicture } from './load-picture';
import { type SourceCondition, type ViewsSource } from './sources';

interface Asked {
  readonly condition: string | null;
  /** A list's code, or ON_BOARD_LIST. */
  readonly list: string | null;
  readonly within: string;
  readonly category: Category | null;
}

export interface LoadedViews {
  readonly conditions: readonly { readonly code: string; readonly title: string }[];
  readonly condition: Pick<SourceCondition, 'code' | 'title' | 'categories' | 'items'>;
  readonly picture: Picture;
  /** Every group path of the lists and every path above one. */
  readonly groups: readonly string[];
}

/** The picture that an address asks for; the first condition where it names none. Null without a condition or a list. */
export async function loadViews(db: Db, source: ViewsSource, asked: Asked): Promise<LoadedViews | null> {
  const { conditions, revisions, subtotals } = source;
  const condition = conditions.find(({ code }) => code === asked.condition) ?? conditions[0];
  if (condition === undefined || revisions.length === 0) return null;
  const picture = await loadPicture(db, source, condition, {
    list: asked.list === ON_BOARD_LIST ? ON_BOARD : asked.list,
    group: asked.within,
    category: asked.category,
  });
  const groups = new Set(
    subtotals.flatMap(({ group }) => {
      const levels = group.split('/');
      return levels.map((_, depth) => levels.slice(0, depth + 1).join('/'));
    }),
  );
  return {
    conditions: conditions.map(({ code, title }) => ({ code, title })),
    condition,
    picture,
    groups: [...groups].sort(),
  };
}
