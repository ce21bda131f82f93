import { type Metadata } from 'next';
import { groupChangesOf, groupsInLists } from '@/db/queries/settings';
import { AddGroupForm, TickedGroupsForm } from '@/components/groups/group-forms';
import { GroupHistory } from '@/components/groups/group-history';
import { GroupTree } from '@/components/groups/group-tree';
import { SettingsNav } from '@/components/settings/settings-nav';
import { PageHead, Section } from '@/components/ui/section';
import { GroupBreakdown, UNGROUPED } from '@/lib/groups/breakdown';
import { USUAL_GROUPS } from '@/lib/groups/usual-groups';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from '../../frame';
import {
  addGroupAction,
  moveGroupAction,
  recodeGroupAction,
  removeGroupAction,
  takeGroupsAction,
} from './actions';

export const metadata: Metadata = { title: 'Group breakdown' };

export default async function GroupsPage({ params }: PageProps<'/programs/[program]/settings/groups'>) {
  const access = await requireProgram((await params).program, 'settings.read');
  const { program } = access;
  const keeps = access.can('groups.keep');
  const [changes, inLists] = await Promise.all([
    groupChangesOf(serverDb(), program.id),
    groupsInLists(serverDb(), program.id),
  ]);
  const breakdown = new GroupBreakdown(changes);
  const nodes = breakdown.nodes();
  const rows = new Map<string, number>();
  const lists = new Map<string, Set<string>>();
  for (const { list, group, rows: count } of inLists) {
    const path = breakdown.present(group);
    rows.set(path, (rows.get(path) ?? 0) + count);
    lists.set(path, (lists.get(path) ?? new Set()).add(list));
  }
  const missing = [...lists]
    .filter(([path]) => path !== UNGROUPED && !breakdown.has(path))
    .sort(([a], [b]) => (a < b ? -1 : 1));
  const usual = USUAL_GROUPS.filter(({ path }) => !breakdown.has(path) && breakdown.present(path) === path);
  return (
    <ProgramFrame access={access}>
      <PageHead
        title="Group breakdown"
        lead="The tree of groups that rows name by their paths, as in Wing/Spars. Growth, limits and comparisons go by it; a row in a group that it lacks is a warning."
      />
      <SettingsNav program={program.code} current="/groups" />
      <Section title="Groups">
        {nodes.length === 0 ? (
          <p className="measure">
            There is no breakdown yet, so that no group is unknown. Begin with the groups of your lists or
            with the usual ones below, then add and rename.
          </p>
        ) : (
          <GroupTree
            nodes={nodes}
            rows={rows}
            program={program.code}
            actions={
              keeps ? { move: moveGroupAction, recode: recodeGroupAction, remove: removeGroupAction } : null
            }
          />
        )}
        {keeps ? (
          <AddGroupForm
            action={addGroupAction}
            program={program.code}
            paths={nodes.map(({ path }) => path)}
          />
        ) : null}
      </Section>
      {missing.length > 0 ? (
        <Section
          title="In lists and not in the breakdown"
          aside={`${missing.length} ${missing.length === 1 ? 'group' : 'groups'}`}
          lead="Of the newest list revisions. Rows are in these groups by what they say; add the groups, or correct the rows."
        >
          {keeps ? (
            <TickedGroupsForm
              action={takeGroupsAction}
              program={program.code}
              words="Add ticked groups"
              offered={missing.map(([path, from]) => ({
                path,
                words: `${rows.get(path) ?? 0} rows, ${[...from].join(', ')}`,
              }))}
            />
          ) : (
            <p>{missing.map(([path]) => path).join(', ')}</p>
          )}
        </Section>
      ) : null}
      {keeps && usual.length > 0 ? (
        <Section
          title="Usual top groups"
          lead="A suggestion from memory of how the open literature names the top groups of an aeroplane’s mass statement. It is nobody’s standard: take what fits and rename it."
        >
          <details open={nodes.length === 0}>
            <summary className="cursor-pointer underline decoration-1 underline-offset-4">
              {usual.length === 1 ? '1 group' : `${usual.length} groups`} that are not in the breakdown
            </summary>
            <div className="pt-4">
              <TickedGroupsForm
                action={takeGroupsAction}
                program={program.code}
                words="Add ticked groups to the breakdown"
                offered={usual.map(({ path, code, holds }) => ({ path, words: `${code}. ${holds}` }))}
              />
            </div>
          </details>
        </Section>
      ) : null}
      {changes.length > 0 ? (
        <Section
          title="History"
          lead="Kept for good: by it a path that a row has said since whenever is read as what it is called today."
        >
          <GroupHistory lines={changes} />
        </Section>
      ) : null}
    </ProgramFrame>
  );
}
