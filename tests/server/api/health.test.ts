import { setTimeout as delay } from 'node:timers/promises';
import { http, HttpResponse } from 'msw';
import { setupServer } from 'msw/node';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { GET } from '@/app/api/v1/health/route';
import { healthEndpoint } from '@/lib/contracts/api/health';
import { programUnderTest, type ProgramUnderTest } from '@/tests/support/program';
import { callerOfEndpoint, documentedStatuses, sorted } from './calls';

const { call, seen } = callerOfEndpoint(healthEndpoint, GET);

const failing = setupServer();
const storeRefuses = http.head(
  `${process.env['S3_ENDPOINT'] ?? ''}/*`,
  () => new HttpResponse(null, { status: 403 }),
);

let test: ProgramUnderTest;
beforeAll(async () => {
  // Before the first call: the client keeps the functions it finds then.
  failing.listen({ onUnhandledRequest: 'bypass' });
  test = await programUnderTest();
});
afterAll(async () => {
  failing.close();
  await test.close();
});

describe('GET health', () => {
  it('says without a token that the service is live and ready', async () => {
    expect(await call()).toMatchObject({ status: 200, body: { live: true, ready: true } });
  });

  it('answers 503 while the file store does not answer as it should, and does not say why', async () => {
    await delay(1100);
    failing.use(storeRefuses);
    const { status, body } = await call();
    failing.resetHandlers();
    expect(status).toBe(503);
    expect(body['detail']).toBe('The service is up and not ready to work.');
    await delay(1100);
    expect((await call()).status).toBe(200);
  });

  it('has given every answer that it documents', () => {
    expect(sorted(seen)).toEqual(documentedStatuses(healthEndpoint));
  });
});
