import { createHash } from 'node:crypto';
import { sql } from 'kysely';
import { type Db } from '@/db/client';
import { AppError } from '@/lib/errors';
import { type RatePolicy } from './policies';

export interface RateState {
  readonly policy: RatePolicy;
  readonly allowed: boolean;
  readonly remaining: number;
  /** Seconds until the window ends. */
  readonly reset: number;
}

/** Buckets carry no address of a person in the clear. */
function bucketOf(policy: RatePolicy, key: string): string {
  return `${policy.name}:${createHash('sha256').update(key).digest('base64url').slice(0, 24)}`;
}

/**
 * Takes one from the bucket of `key`. One statement, by the database's clock: processes that share the database share the limit.
 */
export async function take(db: Db, policy: RatePolicy, key: string): Promise<RateState> {
  const window = sql`make_interval(secs => ${policy.windowSeconds})`;
  const { rows } = await sql<{ count: number; reset: number }>`
    insert into rate_limits as held (bucket, window_started_at, count)
    values (${bucketOf(policy, key)}, now(), 1)
    on conflict (bucket) do update set
      count = case when held.window_started_at <= now() - ${window} then 1 else least(held.count + 1, ${policy.quota + 1}) end,
      window_started_at = case when held.window_started_at <= now() - ${window} then now() else held.window_started_at end
    returning count, ceil(extract(epoch from window_started_at + ${window} - now()))::integer as reset
  `.execute(db);
  return stateOf(policy, rows[0] ?? { count: policy.quota + 1, reset: policy.windowSeconds });
}

/** How the bucket of `key` stands, without taking. */
export async function peek(db: Db, policy: RatePolicy, key: string): Promise<RateState> {
  const window = sql`make_interval(secs => ${policy.windowSeconds})`;
  const { rows } = await sql<{ count: number; reset: number }>`
    select count, ceil(extract(epoch from window_started_at + ${window} - now()))::integer as reset
    from rate_limits where bucket = ${bucketOf(policy, key)} and window_started_at > now() - ${window}
  `.execute(db);
  const row = rows[0];
  if (!row) return { policy, allowed: true, remaining: policy.quota, reset: policy.windowSeconds };
  return { ...stateOf(policy, row), allowed: row.count < policy.quota };
}

function stateOf(policy: RatePolicy, row: { count: number; reset: number }): RateState {
  return {
    policy,
    allowed: row.count <= policy.quota,
    remaining: Math.max(0, policy.quota - row.count),
    reset: Math.max(1, row.reset),
  };
}

export function tooMany(state: RateState): AppError {
  const minutes = Math.ceil(state.reset / 60);
  const when =
    state.reset < 60 ? `${state.reset} seconds` : minutes === 1 ? 'a minute' : `${minutes} minutes`;
  return new AppError('too-many-requests', `Too many attempts. Try again in ${when}.`, {
    retryAfter: state.reset,
  });
}

/** Takes one, or throws `too-many-requests`. */
export async function takeOrRefuse(db: Db, policy: RatePolicy, key: string): Promise<RateState> {
  const state = await take(db, policy, key);
  if (!state.allowed) throw tooMany(state);
  return state;
}

/** `RateLimit` and `RateLimit-Policy` of draft-ietf-httpapi-ratelimit-headers, and Retry-After (RFC 9110) once used up. */
export function rateHeaders(state: RateState): Record<string, string> {
  const { name, quota, windowSeconds } = state.policy;
  return {
    'RateLimit-Policy': `"${name}";q=${quota};w=${windowSeconds}`,
    RateLimit: `"${name}";r=${state.remaining};t=${state.reset}`,
    ...(state.allowed ? {} : { 'Retry-After': String(state.reset) }),
  };
}

/** Gives one back: what turned out well does not count. */
export async function giveBack(db: Db, policy: RatePolicy, key: string): Promise<void> {
  await db
    .updateTable('rate_limits')
    .set((eb) => ({ count: eb('count', '-', 1) }))
    .where('bucket', '=', bucketOf(policy, key))
    .where('count', '>', 0)
    .execute();
}
