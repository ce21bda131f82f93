import { type Metadata } from 'next';
import { currentFrameIssue } from '@/db/queries/frames';
import { listsOfProgram } from '@/db/queries/lists';
import { ListTable } from '@/components/lists/list-table';
import { ButtonLink } from '@/components/ui/button';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { lineOf } from '@/lib/server/lists/list-line';
import { ProgramFrame } from '../frame';

export const metadata: Metadata = { title: 'Lists' };

/** Every mass list of the program, as its newest revision stands. */
export default async function ListsPage({ params }: PageProps<'/programs/[program]/lists'>) {
  const access = await requireProgram((await params).program, 'lists.read');
  const { program, can } = access;
  const home = `/programs/${program.code}/lists`;
  const [lists, frame] = await Promise.all([
    listsOfProgram(serverDb(), program.id),
    currentFrameIssue(serverDb(), program.id),
  ]);
  const keeps = can('lists.keep') && frame !== undefined;
  const example = (
    <ButtonLink href={`/api/internal/programs/${program.code}/lists/example`} download>
      Download the example file
    </ButtonLink>
  );
  return (
    <ProgramFrame access={access} current="lists">
      <PageHead
        title="Lists"
        lead="Components and their masses, a list for each source, kept in revisions."
        actions={
          keeps && lists.length > 0 ? (
            <ButtonLink kind="primary" href={`${home}/new`}>
              Add list
            </ButtonLink>
          ) : null
        }
      />
      {lists.length > 0 ? (
        <ListTable lists={lists.map(lineOf)} home={home} />
      ) : (
        <EmptyPlace
          title="There is no mass list yet"
          action={
            keeps ? (
              <>
                <ButtonLink kind="primary" href={`${home}/new`}>
                  Add list
                </ButtonLink>
                {example}
              </>
            ) : (
              example
            )
          }
        >
          <p>
            A mass list is a CSV file with a row for each component: its mass, its place and, where known, its
            inertia about its own CG. First the list is declared, with its units, axes and the sign of its
            products; then its files are uploaded.
          </p>
          {frame === undefined ? (
            <p>
              A chief engineer has to issue the{' '}
              <TextLink href={`/programs/${program.code}/settings`}>airframe frame</TextLink> before the first
              list.
            </p>
          ) : can('lists.keep') ? null : (
            <p>
              Weights engineers add lists; the{' '}
              <TextLink href={`/programs/${program.code}/settings/members`}>members</TextLink> say who they
              are.
            </p>
          )}
          <p>
            The example holds nine rows of the invented Dunlin 40, in kg and m with positive products, axes
            aft, right, up.
          </p>
        </EmptyPlace>
      )}
    </ProgramFrame>
  );
}
