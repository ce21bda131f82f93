import { type ExpressionBuilder } from 'kysely';
import { type Db } from '@/db/client';
import { type Database } from '@/db/schema/database';

export interface TrailFilter {
  readonly kind: string | null;
  readonly person: string | null;
  /** From the beginning of this day on, UTC. */
  readonly from: Date | null;
  /** Before this. */
  readonly before: Date | null;
  /** Part of the subject, upper or lower case. */
  readonly subject: string | null;
}

function within(filter: TrailFilter) {
  return (eb: ExpressionBuilder<Database, 'audit_events'>) =>
    eb.and([
      ...(filter.kind === null ? [] : [eb('audit_events.kind', '=', filter.kind)]),
      ...(filter.person === null ? [] : [eb('audit_events.user_id', '=', filter.person)]),
      ...(filter.from === null ? [] : [eb('audit_events.at', '>=', filter.from)]),
      ...(filter.before === null ? [] : [eb('audit_events.at', '<', filter.before)]),
      ...(filter.subject === null
        ? []
        : [eb('audit_events.subject', 'ilike', `%${escaped(filter.subject)}%`)]),
    ]);
}

const escaped = (text: string): string => text.replace(/[\\%_]/g, '\\$&');

/** Events of one scope, newest first. */
export function eventsOf(
  db: Db,
  scope: string,
  filter: TrailFilter,
  page: { readonly offset: number; readonly limit: number },
) {
  return db
    .selectFrom('audit_events')
    .leftJoin('users', 'users.id', 'audit_events.user_id')
    .select([
      'audit_events.number',
      'audit_events.at',
      'audit_events.address',
      'audit_events.kind',
      'audit_events.subject',
      'audit_events.detail',
      'audit_events.hash',
      'users.name as person',
    ])
    .where('audit_events.scope', '=', scope)
    .where(within(filter))
    .orderBy('audit_events.number', 'desc')
    .offset(page.offset)
    .limit(page.limit)
    .execute();
}

export async function countEvents(db: Db, scope: string, filter: TrailFilter): Promise<number> {
  const { count } = await db
    .selectFrom('audit_events')
    .select((eb) => eb.fn.countAll<number>().as('count'))
    .where('audit_events.scope', '=', scope)
    .where(within(filter))
    .executeTakeFirstOrThrow();
  return count;
}

/** Who did something in a scope, and the kinds of what was done, for the choices of the filter. */
export async function choicesOf(db: Db, scope: string) {
  const [people, kinds] = await Promise.all([
    db
      .selectFrom('audit_events')
      .innerJoin('users', 'users.id', 'audit_events.user_id')
      .select(['users.id', 'users.name'])
      .distinct()
      .where('audit_events.scope', '=', scope)
      .orderBy('users.name')
      .execute(),
    db
      .selectFrom('audit_events')
      .select('kind')
      .distinct()
      .where('scope', '=', scope)
      .orderBy('kind')
      .execute(),
  ]);
  return { people, kinds: kinds.map(({ kind }) => kind) };
}
