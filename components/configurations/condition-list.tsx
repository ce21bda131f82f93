import { CATEGORY_WORDS } from '@/components/configurations/category-words';
import { OneButtonForm } from '@/components/forms/one-button-form';
import { Num } from '@/components/mass/num';
import { DialogButton } from '@/components/ui/dialog-button';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { type FormAction } from '@/lib/form-state';
import { type Category } from '@/lib/mass/component';

interface ConditionListProps {
  readonly conditions: readonly {
    readonly code: string;
    readonly title: string;
    readonly categories: readonly Category[];
    readonly items: readonly { readonly mass: number }[];
  }[];
  /** Address of the page, for the way to each one's form. */
  readonly here: string;
  readonly remove: { readonly action: FormAction; readonly fields: Readonly<Record<string, string>> };
}

/** The conditions of a configuration, to be changed or removed. */
export function ConditionList({ conditions, here, remove }: ConditionListProps) {
  return (
    <Table caption="Conditions" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Condition</ColumnHead>
          <ColumnHead>Code</ColumnHead>
          <ColumnHead>Rows on board</ColumnHead>
          <ColumnHead side="right">Items</ColumnHead>
          <ColumnHead side="right" unit="kg">
            Mass of items
          </ColumnHead>
          <ColumnHead>
            <span className="sr-only">Remove</span>
          </ColumnHead>
        </tr>
      </thead>
      <tbody>
        {conditions.map(({ code, title, categories, items }) => (
          <tr key={code}>
            <RowHead>
              <TextLink href={`${here}?edit=${code}`}>{title}</TextLink>
            </RowHead>
            <Cell>
              <code>{code}</code>
            </Cell>
            <Cell>{categories.map((category) => CATEGORY_WORDS[category]).join(', ') || 'none'}</Cell>
            <Cell side="right">
              <Num value={items.length} decimals={0} />
            </Cell>
            <Cell side="right">
              <Num value={items.reduce((sum, item) => sum + item.mass, 0)} decimals={1} />
            </Cell>
            <Cell>
              <span className="-my-1.5 flex pointer-coarse:-my-3">
                <DialogButton words="Remove condition" kind="quiet" title={`Remove: ${title}?`} asks>
                  <p className="measure">
                    The configuration is no longer rolled up for it. Roll-ups and baselines made before keep
                    it.
                  </p>
                  <OneButtonForm
                    action={remove.action}
                    fields={{ ...remove.fields, code }}
                    words="Remove condition"
                    pendingWords="Removing"
                    kind="danger"
                  />
                </DialogButton>
              </span>
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
