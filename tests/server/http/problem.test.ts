import { sql } from 'kysely';
import { expect, it } from 'vitest';
import { z } from 'zod';
import { AppError, ERROR_CODES, problemType } from '@/lib/errors';
import { failureOf, problemResponse } from '@/lib/server/http/problem';
import { readJson } from '@/lib/server/http/read-json';
import { peopleUnderTest } from '../../support/people';

it('is a problem document of RFC 9457 with a type that never changes', async () => {
  const error = new AppError('invalid-input', 'Two lines are wrong.', {
    errors: [{ line: 3, column: 'mass', message: '"x" is not a number' }],
  });
  const response = problemResponse(failureOf(error, 'test'));
  expect(response.status).toBe(422);
  expect(response.headers.get('content-type')).toBe('application/problem+json');
  expect(response.headers.get('cache-control')).toBe('no-store');
  expect(await response.json()).toEqual({
    type: 'urn:polhode:problem:invalid-input',
    title: ERROR_CODES['invalid-input'].title,
    status: 422,
    detail: 'Two lines are wrong.',
    errors: [{ line: 3, column: 'mass', message: '"x" is not a number' }],
  });
});

it('tells nothing of a fault of ours but an id to look it up by', async () => {
  const response = problemResponse(failureOf(new Error('password of the database is hush'), 'test'));
  expect(response.status).toBe(500);
  const body = (await response.json()) as { instance: string };
  expect(JSON.stringify(body)).not.toContain('hush');
  expect(body).toMatchObject({ type: problemType('internal') });
  expect(body.instance).toMatch(/^urn:uuid:[0-9a-f-]{36}$/);
});

it('blames a NUL character on the request that holds it', async () => {
  const test = await peopleUnderTest();
  for (const query of [sql`select ${'a\0'}::text`, sql`select ${'{"a":"\\u0000"}'}::jsonb`]) {
    const refused = await query.execute(test.db).catch((error: unknown) => error);
    expect(failureOf(refused, 'test')).toMatchObject({ id: null, error: { code: 'invalid-request' } });
  }
  await test.close();
});

it('says when to come back', () => {
  const response = problemResponse(
    failureOf(new AppError('too-many-requests', 'Later.', { retryAfter: 7 }), 'test'),
  );
  expect(response.status).toBe(429);
  expect(response.headers.get('retry-after')).toBe('7');
});

const send = (body: string | Uint8Array, type = 'application/json') =>
  readJson(
    new Request('http://polhode.example/', {
      method: 'POST',
      headers: { 'content-type': type },
      body: typeof body === 'string' ? body : Buffer.from(body),
    }),
    z.object({ list: z.object({ 'a/b': z.number() }) }),
  );

it('reads a JSON body of the right shape', async () => {
  expect(await send('{"list": {"a/b": 1}}')).toEqual({ list: { 'a/b': 1 } });
});

it('points into a JSON body of the wrong shape by RFC 6901', async () => {
  await expect(send('{"list": {"a/b": "1"}}')).rejects.toMatchObject({
    code: 'invalid-input',
    errors: [{ pointer: '/list/a~1b' }],
  });
});

it.each([
  ['{', 'application/json', 'invalid-request'],
  [new Uint8Array([0x22, 0xff, 0x22]), 'application/json', 'invalid-request'],
  ['{}', 'text/plain', 'unsupported-media-type'],
  [`"${'x'.repeat(1024 * 1024)}"`, 'application/json', 'too-large'],
])('refuses the body %.10j as %s', async (body, type, code) => {
  await expect(send(body, type)).rejects.toMatchObject({ code });
});
