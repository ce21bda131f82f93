import { type Metadata } from 'next';
import { type LaterSide, pathWith, rowsPath } from '@/components/baselines/paths';
import { ChangeTable } from '@/components/lists/change-table';
import { EmptyPlace } from '@/components/ui/empty-place';
import { Pagination } from '@/components/ui/pagination';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { loadSides } from '@/lib/server/baselines/load-sides';
import { countPairs, revisionPairs, rowsOfPair } from '@/lib/server/baselines/revision-changes';
import { serverDb } from '@/lib/server/database';
import { orShow, requireProgram } from '@/lib/server/http/page';
import { pageOf } from '@/lib/server/lists/page-of';
import { ProgramFrame } from '../../frame';

export const metadata: Metadata = { title: 'Rows behind a change' };

/** Of each list as many as this; one list alone is paged through. */
const PAGE = 100;

/** The rows behind a change between two baselines, or a baseline and a submission, of one list or of one group. */
export default async function RowsPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/baselines/rows'>) {
  const access = await requireProgram((await params).program, 'lists.read');
  const { program } = access;
  const home = `/programs/${program.code}/baselines`;
  const asked = await searchParams;
  const text = (name: string): string | null => {
    const value = asked[name];
    return typeof value === 'string' && value !== '' ? value : null;
  };
  const [list, group] = [text('list'), text('group')];
  const { before, after } = await orShow(() => loadSides(serverDb(), program.id, asked));
  const pairs = await revisionPairs(serverDb(), before?.submissionId ?? null, after.submissionId);
  const counted = await countPairs(
    serverDb(),
    pairs.filter((pair) => list === null || pair.list === list),
    group,
  );
  const changed = counted
    .map((pair) => ({ ...pair, total: pair.counts.added + pair.counts.removed + pair.counts.changed }))
    .filter(({ total }) => total > 0);
  const later: LaterSide = after.number === null ? { submission: after.submissionId } : { to: after.number };
  const pathOf = (narrowed: { list?: string }) =>
    rowsPath(home, before?.number ?? null, later, { ...(group === null ? {} : { group }), ...narrowed });
  const shown = await Promise.all(
    changed.map(async (pair) => {
      const part = pageOf(
        list === null ? undefined : asked['page'],
        pair.total,
        PAGE,
        `${pathOf({ list: pair.list })}&`,
      );
      return {
        ...pair,
        words: part.words,
        rows: (await rowsOfPair(serverDb(), pair, { offset: part.offset, limit: PAGE, group })).rows,
      };
    }),
  );
  return (
    <ProgramFrame access={access} current="baselines">
      <PageHead
        title={group === null ? 'Rows behind the change' : `Rows behind the change of ${group}`}
        above={
          <TextLink
            href={
              after.number === null ? `${home}/submissions/${after.submissionId}` : `${home}/${after.number}`
            }
          >
            {after.name}
          </TextLink>
        }
        lead={
          before === null
            ? `${after.name}: there is nothing before it, every row is new.`
            : `From ${before.name.toLowerCase()} to ${after.number === null ? after.name : after.name.toLowerCase()}. Figures are in the units and signs of each list's later revision.`
        }
      />
      {shown.length === 0 ? (
        <EmptyPlace title="No row differs">
          <p>
            {group === null
              ? 'Both hold the same rows.'
              : `Both hold the same rows in ${group}. What changed there comes from growth allowances or from items on board.`}
          </p>
        </EmptyPlace>
      ) : null}
      {shown.map((pair) => (
        <Section
          key={pair.list}
          title={pair.title}
          aside={`revision ${pair.before?.number ?? 'none'} to ${pair.after?.number ?? 'none'}`}
        >
          <ChangeTable
            rows={pair.rows}
            hrefOf={(item, kind) =>
              `${pathWith(`/programs/${program.code}/lists/${pair.list}`, {
                revision: (kind === 'removed' ? pair.before : pair.after)?.number ?? null,
                find: item,
                row: item,
              })}#rows`
            }
          />
          {list === null ? (
            pair.total > PAGE ? (
              <p>
                The first {PAGE} of {pair.total} rows.{' '}
                <TextLink href={pathOf({ list: pair.list })}>All of them</TextLink>
              </p>
            ) : null
          ) : (
            <Pagination {...pair.words} of="rows" />
          )}
        </Section>
      ))}
    </ProgramFrame>
  );
}
