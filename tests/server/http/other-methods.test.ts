import { expect, it } from 'vitest';
import * as rollUps from '@/app/api/v1/roll-ups/route';
import { otherMethods } from '@/lib/server/http/other-methods';

it('answers a method that a path does not have with a problem that says which it has (RFC 9110 section 15.5.6)', async () => {
  const response = await rollUps.GET(new Request('http://polhode.test/api/v1/roll-ups'));
  expect(response.status).toBe(405);
  expect(response.headers.get('allow')).toBe('POST, OPTIONS');
  expect(response.headers.get('content-type')).toBe('application/problem+json');
  expect(await response.json()).toMatchObject({
    type: 'urn:polhode:problem:method-not-allowed',
    detail: '/api/v1/roll-ups has no GET. It has POST, OPTIONS.',
  });
});

it('refuses every method but the own ones', () => {
  expect(Object.keys(otherMethods('GET')).sort()).toEqual(['DELETE', 'PATCH', 'POST', 'PUT']);
  expect(Object.keys(otherMethods('PUT', 'GET')).sort()).toEqual(['DELETE', 'PATCH', 'POST']);
});
