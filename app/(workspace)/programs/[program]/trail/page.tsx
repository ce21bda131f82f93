import { type Metadata } from 'next';
import { choicesOf, countEvents, eventsOf } from '@/db/queries/trail';
import { pathWith } from '@/components/baselines/paths';
import { TrailFilterForm } from '@/components/trail/trail-filter-form';
import { TrailTable } from '@/components/trail/trail-table';
import { EmptyPlace } from '@/components/ui/empty-place';
import { Pagination } from '@/components/ui/pagination';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { eventWords, kindName } from '@/lib/audit/words';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { pageOf } from '@/lib/server/lists/page-of';
import { ProgramFrame } from '../frame';

export const metadata: Metadata = { title: 'Trail' };

const PAGE = 100;
const DAY_MS = 86_400_000;

/** Everything that was done in a program: who, when, from where, what. */
export default async function TrailPage({ params, searchParams }: PageProps<'/programs/[program]/trail'>) {
  const access = await requireProgram((await params).program, 'trail.read');
  const { program } = access;
  const asked = await searchParams;
  const text = (name: string): string => {
    const value = asked[name];
    return typeof value === 'string' ? value.slice(0, 200) : '';
  };
  const typed = {
    kind: text('kind'),
    person: text('person'),
    from: text('from'),
    until: text('until'),
    subject: text('subject').trim(),
  };
  const until = dayOf(typed.until);
  const filter = {
    kind: typed.kind || null,
    person: typed.person || null,
    from: dayOf(typed.from),
    before: until && new Date(until.getTime() + DAY_MS),
    subject: typed.subject || null,
  };
  const path = `/programs/${program.code}/trail`;
  const [total, choices] = await Promise.all([
    countEvents(serverDb(), program.id, filter),
    choicesOf(serverDb(), program.id),
  ]);
  const address = pathWith(path, typed);
  const page = pageOf(asked['page'], total, PAGE, `${address}${address === path ? '?' : '&'}`);
  const events = await eventsOf(serverDb(), program.id, filter, { offset: page.offset, limit: PAGE });
  return (
    <ProgramFrame access={access}>
      <PageHead
        title="Trail"
        above={<TextLink href={`/programs/${program.code}`}>{program.title}</TextLink>}
        lead={
          <>
            Every step in this program, written in the same transaction as the step. Each event carries a hash
            over the one before it; <code>npm run verify</code> on the server walks the chain and says where
            an event is missing or altered.
          </>
        }
      />
      <TrailFilterForm path={path} typed={typed} people={choices.people} kinds={kindChoices(choices.kinds)} />
      {events.length === 0 ? (
        <EmptyPlace title="No event fits">
          <p>
            <TextLink href={path}>Show all events</TextLink>
          </p>
        </EmptyPlace>
      ) : (
        <>
          <TrailTable
            events={events.map((event) => ({
              number: event.number,
              at: event.at,
              person: event.person,
              address: event.address,
              kind: kindName(event.kind),
              subject: event.subject,
              words: eventWords(event.kind, event.detail),
              hash: event.hash,
            }))}
          />
          <Pagination {...page.words} of="events" />
        </>
      )}
    </ProgramFrame>
  );
}

/** The beginning of a day in UTC; null for what is no day. */
function dayOf(text: string): Date | null {
  const at = /^\d{4}-\d{2}-\d{2}$/.test(text) ? new Date(`${text}T00:00:00Z`) : null;
  return at === null || Number.isNaN(at.getTime()) ? null : at;
}

function kindChoices(kinds: readonly string[]) {
  return kinds
    .map((kind) => ({ value: kind, label: kindName(kind) }))
    .sort((a, b) => a.label.localeCompare(b.label, 'en'));
}
