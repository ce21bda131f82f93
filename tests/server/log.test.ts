import { Writable } from 'node:stream';
import pino from 'pino';
import { expect, it } from 'vitest';
import { LOG_OPTIONS } from '@/lib/server/log';

function written(record: object): string {
  let text = '';
  const sink = new Writable({
    write(chunk: Buffer, _encoding, done) {
      text += chunk.toString();
      done();
    },
  });
  pino(LOG_OPTIONS, sink).info(record, 'a message');
  return text;
}

it('writes no password, token, cookie or body, however deep it lies in the record', () => {
  const line = written({
    password: 'hush-1',
    headers: { authorization: 'hush-2', cookie: 'hush-3', 'set-cookie': 'hush-4' },
    request: { headers: { cookie: 'hush-5' }, body: 'hush-6' },
    user: { email: 'a@x.example', passwordHash: 'hush-7', token: 'hush-8' },
  });
  expect(line).not.toContain('hush');
  expect(line).toContain('[redacted]');
});

it('writes what is no secret', () => {
  expect(written({ user: { email: 'a@x.example' }, rows: 3 })).toContain('"rows":3');
});
