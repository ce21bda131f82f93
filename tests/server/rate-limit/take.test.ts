import type pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createDb, createPool, type Db } from '@/db/client';
import { giveBack, peek, rateHeaders, take, takeOrRefuse } from '@/lib/server/rate-limit/take';
import { type PeopleUnderTest, peopleUnderTest } from '../../support/people';

const POLICY = { name: 'test', quota: 5, windowSeconds: 60 };

let test: PeopleUnderTest;
let other: { pool: pg.Pool; db: Db };

beforeAll(async () => {
  test = await peopleUnderTest();
  const pool = createPool(test.appUrl, 8, () => undefined);
  other = { pool, db: createDb(pool) };
});
afterAll(async () => {
  await other.db.destroy();
  await test.close();
});

describe('a rate limit', () => {
  it('is one for all processes that share the database, to the last request', async () => {
    const tries = Array.from({ length: 40 }, (_, i) =>
      take(i % 2 === 0 ? test.db : other.db, POLICY, 'shared'),
    );
    const allowed = (await Promise.all(tries)).filter((state) => state.allowed);
    expect(allowed).toHaveLength(POLICY.quota);
    expect(allowed.map((state) => state.remaining).sort()).toEqual([0, 1, 2, 3, 4]);
  });

  it('counts each key by itself', async () => {
    for (let i = 0; i < POLICY.quota; i += 1) await takeOrRefuse(test.db, POLICY, 'ann');
    await expect(takeOrRefuse(test.db, POLICY, 'ann')).rejects.toMatchObject({ code: 'too-many-requests' });
    expect((await take(test.db, POLICY, 'bob')).allowed).toBe(true);
  });

  it('begins anew when its window has passed', async () => {
    for (let i = 0; i < 7; i += 1) await take(test.db, POLICY, 'later');
    await test.db
      .updateTable('rate_limits')
      .set({ window_started_at: new Date(Date.now() - 61_000) })
      .execute();
    expect(await peek(test.db, POLICY, 'later')).toMatchObject({ allowed: true, remaining: 5 });
    expect(await take(test.db, POLICY, 'later')).toMatchObject({ allowed: true, remaining: 4, reset: 60 });
  });

  it('does not count what is given back', async () => {
    for (let i = 0; i < 20; i += 1) {
      expect((await take(test.db, POLICY, 'good')).allowed).toBe(true);
      await giveBack(test.db, POLICY, 'good');
    }
  });

  it('stores no address of a person', async () => {
    await take(test.db, POLICY, 'ann@skerry.example');
    const rows = await test.db.selectFrom('rate_limits').select('bucket').execute();
    expect(JSON.stringify(rows)).not.toContain('skerry');
  });
});

it('is told in the header fields of draft-ietf-httpapi-ratelimit-headers, with Retry-After once used up', () => {
  expect(rateHeaders({ policy: POLICY, allowed: true, remaining: 3, reset: 42 })).toEqual({
    'RateLimit-Policy': '"test";q=5;w=60',
    RateLimit: '"test";r=3;t=42',
  });
  expect(rateHeaders({ policy: POLICY, allowed: false, remaining: 0, reset: 42 })).toMatchObject({
    'Retry-After': '42',
  });
});
