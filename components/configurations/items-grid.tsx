'use client';

import { CATEGORY_WORDS } from '@/components/configurations/category-words';
import { Button } from '@/components/ui/button';
import { classes } from '@/components/ui/classes';
import { CONTROL_CLASS } from '@/components/ui/field';
import { SelectControl } from '@/components/ui/select-control';
import { Cell, ColumnHead, Table } from '@/components/ui/table';
import { type AxisTriple } from '@/lib/frames/axes';
import { CATEGORIES, type Category } from '@/lib/mass/component';
import { type LengthUnit, type MassUnit } from '@/lib/units/table';

/** An item on board as it is typed. */
export interface ItemText {
  readonly name: string;
  readonly category: Category;
  readonly mass: string;
  readonly x: string;
  readonly y: string;
  readonly z: string;
}

const NEW_ITEM: ItemText = { name: '', category: 'payload', mass: '', x: '', y: '', z: '' };
const FIGURES = ['mass', 'x', 'y', 'z'] as const;

interface ItemsGridProps {
  readonly items: readonly ItemText[];
  readonly onItems: (items: readonly ItemText[]) => void;
  readonly axes: AxisTriple;
  readonly massUnit: MassUnit;
  readonly lengthUnit: LengthUnit;
}

/** The named items of a condition, edited in place. */
export function ItemsGrid({ items, onItems, axes, massUnit, lengthUnit }: ItemsGridProps) {
  const change = (index: number, part: Partial<ItemText>) =>
    onItems(items.map((item, at) => (at === index ? { ...item, ...part } : item)));
  return (
    <div className="grid min-w-0 justify-items-start gap-3">
      {items.length === 0 ? (
        <p className="text-ink-2">No item on board beside the rows of the lists.</p>
      ) : (
        <div className="w-full min-w-0">
          <Table caption="Items on board: point masses at places in airframe axes from the datum; they do not grow">
            <thead>
              <tr>
                <ColumnHead>Item</ColumnHead>
                <ColumnHead>Category</ColumnHead>
                <ColumnHead side="right" unit={massUnit}>
                  Mass
                </ColumnHead>
                {(['x', 'y', 'z'] as const).map((letter, index) => (
                  <ColumnHead key={letter} side="right" unit={lengthUnit}>
                    {letter} {axes[index]}
                  </ColumnHead>
                ))}
                <ColumnHead>
                  <span className="sr-only">Remove</span>
                </ColumnHead>
              </tr>
            </thead>
            <tbody>
              {items.map((item, index) => (
                <tr key={index}>
                  <Cell>
                    <input
                      aria-label={`Name of item ${index + 1}`}
                      value={item.name}
                      onChange={(event) => change(index, { name: event.target.value })}
                      className={classes(CONTROL_CLASS, 'min-w-48')}
                    />
                  </Cell>
                  <Cell>
                    <SelectControl
                      aria-label={`Category of item ${index + 1}`}
                      value={item.category}
                      onChange={(event) => {
                        const category = CATEGORIES.find((one) => one === event.target.value);
                        if (category) change(index, { category });
                      }}
                      className="min-w-40"
                    >
                      {CATEGORIES.map((category) => (
                        <option key={category} value={category}>
                          {CATEGORY_WORDS[category]}
                        </option>
                      ))}
                    </SelectControl>
                  </Cell>
                  {FIGURES.map((name) => (
                    <Cell key={name} side="right">
                      <input
                        aria-label={`${name} of item ${index + 1}, ${name === 'mass' ? massUnit : lengthUnit}`}
                        value={item[name]}
                        inputMode="decimal"
                        spellCheck={false}
                        autoComplete="off"
                        onChange={(event) => change(index, { [name]: event.target.value })}
                        className={classes(CONTROL_CLASS, 'num min-w-24 text-right')}
                      />
                    </Cell>
                  ))}
                  <Cell>
                    <Button kind="quiet" onClick={() => onItems(items.filter((_, at) => at !== index))}>
                      Remove
                    </Button>
                  </Cell>
                </tr>
              ))}
            </tbody>
          </Table>
        </div>
      )}
      <Button onClick={() => onItems([...items, NEW_ITEM])}>Add item</Button>
    </div>
  );
}
