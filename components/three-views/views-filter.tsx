import { CATEGORY_WORDS } from '@/components/configurations/category-words';
import { type ViewsAddress, viewsFields, viewsHref } from '@/components/three-views/views-address';
import { Button } from '@/components/ui/button';
import { SelectField } from '@/components/ui/select-field';
import { TextLink } from '@/components/ui/text-link';
import { type Category } from '@/lib/mass/component';
import { ON_BOARD_LIST } from '@/lib/three-views/group-key';

interface ViewsFilterProps {
  readonly path: string;
  readonly view: ViewsAddress;
  readonly lists: readonly { readonly code: string; readonly title: string }[];
  /** Paths, those above others included. */
  readonly groups: readonly string[];
  readonly categories: readonly Category[];
  readonly itemsOnBoard: boolean;
}

/** Which components are drawn; the choice is the page's address. */
export function ViewsFilter({ path, view, lists, groups, categories, itemsOnBoard }: ViewsFilterProps) {
  const { list, within, category, ...rest } = view;
  const filtered = list !== null || within !== '' || category !== null;
  const plain: ViewsAddress = { ...rest, list: null, within: '', category: null };
  return (
    <form
      action={path}
      className="no-print grid items-end gap-x-4 gap-y-3 sm:grid-cols-2 md:grid-cols-[repeat(3,minmax(0,224px))_auto]"
    >
      {Object.entries(viewsFields(plain)).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <SelectField
        name="within"
        label="Group"
        placeholder="All groups"
        defaultValue={within}
        options={groups.map((group) => ({ value: group, label: group }))}
      />
      <SelectField
        name="category"
        label="Category"
        placeholder="All categories"
        defaultValue={category ?? ''}
        options={categories.map((one) => ({ value: one, label: CATEGORY_WORDS[one] }))}
      />
      <SelectField
        name="list"
        label="List"
        placeholder="All lists"
        defaultValue={list ?? ''}
        options={[
          ...lists.map(({ code, title }) => ({ value: code, label: title })),
          ...(itemsOnBoard ? [{ value: ON_BOARD_LIST, label: 'Items on board' }] : []),
        ]}
      />
      <div className="flex items-center gap-4">
        <Button type="submit">Filter components</Button>
        {filtered ? <TextLink href={viewsHref(path, plain)}>All</TextLink> : null}
      </div>
    </form>
  );
}
