import { CATEGORY_WORDS } from '@/components/configurations/category-words';
import { Num } from '@/components/mass/num';
import { type Category } from '@/lib/mass/component';
import { type MassUnit } from '@/lib/units/table';

interface OnBoardProps {
  readonly conditions: readonly {
    readonly code: string;
    readonly title: string;
    readonly categories: readonly Category[];
    readonly items: readonly { readonly mass: number }[];
  }[];
  readonly massUnit: MassUnit;
}

/** What each condition has on board, in a line. */
export function OnBoard({ conditions, massUnit }: OnBoardProps) {
  return (
    <ul className="grid border-t border-rule">
      {conditions.map(({ code, title, categories, items }) => {
        const mass = items.reduce((sum, item) => sum + item.mass, 0);
        return (
          <li key={code} className="grid gap-0.5 border-b border-rule py-2">
            <span>{title}</span>
            <span className="text-note text-ink-2">
              {categories.length === 0
                ? 'No rows of the lists'
                : `Rows: ${categories.map((category) => CATEGORY_WORDS[category].toLowerCase()).join(', ')}`}
              {items.length === 0 ? null : (
                <>
                  ; {items.length} {items.length === 1 ? 'item' : 'items'},{' '}
                  <Num value={mass} unit={massUnit} decimals={1} showUnit />
                </>
              )}
            </span>
          </li>
        );
      })}
    </ul>
  );
}
