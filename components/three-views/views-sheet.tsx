import { LeftOutWords } from '@/components/three-views/left-out-words';
import { ThreeViews } from '@/components/three-views/three-views';
import { type ViewsAddress, viewsHref } from '@/components/three-views/views-address';
import { ViewsFilter } from '@/components/three-views/views-filter';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { EmptyPlace } from '@/components/ui/empty-place';
import { type Category } from '@/lib/mass/component';
import { ON_BOARD, ON_BOARD_LIST, topGroup } from '@/lib/three-views/group-key';
import { type Picture } from '@/lib/three-views/picture';
import { OUTPUT_UNITS, UNIT_SYSTEMS } from '@/lib/units/names';

interface ViewsSheetProps {
  /** The page without its query. */
  readonly path: string;
  readonly view: ViewsAddress;
  readonly conditions: readonly { readonly code: string; readonly title: string }[];
  readonly condition: {
    readonly code: string;
    readonly categories: readonly Category[];
    readonly items: readonly unknown[];
  };
  readonly picture: Picture;
  /** Of the program, whatever is filtered. */
  readonly groups: readonly string[];
  readonly listsHref: string;
  readonly exportName: string;
}

/** Everything of the page under its title: choices, filter, the views and what stands behind them. */
export function ViewsSheet(props: ViewsSheetProps) {
  const { path, view, conditions, condition, picture, groups, listsHref, exportName } = props;
  const to = (changes: Partial<ViewsAddress>) => viewsHref(path, { ...view, ...changes });
  const units = OUTPUT_UNITS[view.units];
  const groupHrefs = Object.fromEntries([
    ['', to({ within: '', list: null })],
    ...picture.groups.map(({ group }) =>
      group === ON_BOARD
        ? [group, to({ within: '', list: ON_BOARD_LIST })]
        : [group, to({ within: group, list: view.list === ON_BOARD_LIST ? null : view.list })],
    ),
  ]) as Readonly<Record<string, string>>;
  return (
    <>
      <div className="no-print flex flex-wrap gap-x-8 gap-y-1">
        {conditions.length > 1 ? (
          <ChoiceLinks
            label="Condition"
            options={conditions.map(({ code, title }) => ({
              href: to({ condition: code }),
              words: title,
              current: code === condition.code,
            }))}
          />
        ) : null}
        <ChoiceLinks
          label="Units"
          options={UNIT_SYSTEMS.map((system) => ({
            href: to({ units: system }),
            words: system === 'si' ? 'kg, m' : 'lb, in',
            current: system === view.units,
          }))}
        />
        {picture.points.length > 0 ? (
          <ChoiceLinks
            label="Reference points"
            options={[true, false].map((points) => ({
              href: to({ points }),
              words: points ? 'shown' : 'hidden',
              current: points === view.points,
            }))}
          />
        ) : null}
      </div>
      <ViewsFilter
        path={path}
        view={view}
        lists={picture.lists}
        groups={groups}
        categories={condition.categories}
        itemsOnBoard={condition.items.length > 0}
      />
      {picture.rows.length === 0 ? (
        <EmptyPlace title="Nothing is drawn">
          <p>No component of this condition is in the group, category and list that are asked for.</p>
        </EmptyPlace>
      ) : (
        <ThreeViews
          picture={picture}
          system={view.units}
          showPoints={view.points}
          group={view.list === ON_BOARD_LIST ? ON_BOARD : view.within === '' ? null : topGroup(view.within)}
          groupHrefs={groupHrefs}
          listsHref={listsHref}
          exportName={exportName}
          filtered={view.list !== null || view.within !== '' || view.category !== null}
          notes={<LeftOutWords picture={picture} units={units} />}
        />
      )}
    </>
  );
}
