'use client';

import { useId, useMemo } from 'react';
import { type TableView } from '@/components/data-table/view';
import { branchesInSight, GroupTable } from '@/components/lists/group-table';
import { type RowColumn } from '@/components/lists/row-columns';
import { useRowGroups } from '@/components/lists/use-row-groups';
import { Banner } from '@/components/ui/banner';
import { Button } from '@/components/ui/button';
import { Section } from '@/components/ui/section';
import { SelectControl } from '@/components/ui/select-control';
import { type RowGroups } from '@/lib/contracts/list-groups';
import { type ListView } from '@/lib/contracts/list-view';
import { type ListDeclarations } from '@/lib/mass/declarations';

interface GroupsSectionProps {
  /** Columns by which rows can be put into groups. */
  readonly columns: readonly RowColumn[];
  readonly view: TableView;
  readonly listView: ListView;
  readonly onView: (view: TableView) => void;
  readonly revisionRoute: string;
  readonly query: string;
  readonly start: RowGroups | null;
  readonly declarations: ListDeclarations;
}

/** The rows in view by the values of a column, as a tree where the values are paths; one pressed shows its rows alone. */
export function GroupsSection(props: GroupsSectionProps) {
  const { columns, view, listView, onView, revisionRoute, query, start, declarations } = props;
  const id = useId();
  const column = columns.find((one) => one.id === view.by) ?? columns.find((one) => one.id === 'group');
  const by = column?.id ?? 'group';
  const isTree = by === 'group';
  const { groups, isOld, error, retry } = useRowGroups(revisionRoute, query, by, start);
  const branches = useMemo(
    () => (groups === null ? [] : branchesInSight(groups.groups, isTree, view.unfolded)),
    [groups, isTree, view.unfolded],
  );
  const chosen = isTree ? listView.group || null : listView.where === by ? listView.is : null;
  const choose = (value: string) => {
    const again = value === chosen;
    onView(
      isTree
        ? { ...view, group: again ? '' : value }
        : { ...view, only: again ? null : { column: by, value } },
    );
    if (!again) document.getElementById('rows')?.scrollIntoView();
  };
  const all = groups?.groups ?? [];
  const fold = (value: string) => {
    const open = view.unfolded.includes('*')
      ? all
          .filter((group) => all.some((one) => one.value.startsWith(`${group.value}/`)))
          .map((one) => one.value)
      : view.unfolded;
    onView({
      ...view,
      unfolded: open.includes(value) ? open.filter((one) => one !== value) : [...open, value],
    });
  };
  const isDeep = isTree && all.some(({ value }) => value.includes('/'));
  return (
    <Section title="Groups">
      <div className="no-print flex flex-wrap items-end gap-x-4 gap-y-2">
        <div className="grid w-52 gap-1">
          <label htmlFor={id} className="text-note text-ink-2">
            Put rows together by
          </label>
          <SelectControl
            id={id}
            value={by}
            onChange={({ target }) => onView({ ...view, by: target.value === 'group' ? '' : target.value })}
          >
            {columns.map((one) => (
              <option key={one.id} value={one.id}>
                {one.title}
              </option>
            ))}
          </SelectControl>
        </div>
        {isDeep ? (
          <Button onClick={() => onView({ ...view, unfolded: view.unfolded.length > 0 ? [] : ['*'] })}>
            {view.unfolded.length > 0 ? 'Fold all' : 'Unfold all'}
          </Button>
        ) : null}
      </div>
      {error === null ? null : (
        <Banner
          severity="blocker"
          word="Failed"
          live
          title="The groups could not be loaded"
          action={<Button onClick={retry}>Try again</Button>}
        >
          <p>{error.message}</p>
        </Banner>
      )}
      {groups === null ? (
        error === null ? (
          <p role="status">Adding up the groups</p>
        ) : null
      ) : (
        <div aria-busy={isOld}>
          <GroupTable
            by={column?.title ?? 'Group'}
            groups={groups}
            branches={branches}
            unfolded={view.unfolded}
            declarations={declarations}
            chosen={chosen}
            onChoose={choose}
            onFold={fold}
          />
        </div>
      )}
      <p className="measure text-note text-ink-2">
        {groups !== null && groups.of > all.length
          ? `The ${all.length} values of most mass, of ${groups.of}. `
          : ''}
        {isTree ? 'Each group with the groups below it; share' : 'Share'} of the mass of all, without growth,
        mirror images included; memo rows and adjustments not approved are left out.
      </p>
    </Section>
  );
}
