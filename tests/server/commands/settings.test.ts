import { describe, expect, it } from 'vitest';
import { externalSettings } from '@/lib/server/commands/local/external.mjs';
import { readEnv } from '@/lib/server/env';

const GIVEN = {
  DATABASE_URL: 'postgres://app:p@db.example:5432/polhode',
  MIGRATION_DATABASE_URL: 'postgres://owner:p@db.example:5432/polhode',
  APP_URL: 'https://polhode.example',
  S3_ENDPOINT: 'https://s3.example',
  S3_REGION: 'r',
  S3_BUCKET: 'b',
  S3_ACCESS_KEY_ID: 'k',
  S3_SECRET_ACCESS_KEY: 's',
  SMTP_URL: 'smtps://user:p@mail.example:465',
};

describe('services of the user’s own', () => {
  it('are used when all their settings are there, with a sender at the application’s address', () => {
    expect(externalSettings(GIVEN)).toEqual({ ...GIVEN, MAIL_FROM: 'Polhode <no-reply@polhode.example>' });
  });

  it('are not meant when none of them is set', () => {
    expect(externalSettings({ PATH: '/bin' })).toBeNull();
  });

  it('are refused by naming each setting that is missing', () => {
    const some = { ...GIVEN, S3_SECRET_ACCESS_KEY: undefined, SMTP_URL: '' };
    expect(() => externalSettings(some)).toThrow(/^Not set: S3_SECRET_ACCESS_KEY, SMTP_URL\./);
  });
});

describe('the server’s environment', () => {
  const all = { ...GIVEN, MAIL_FROM: 'Polhode <no-reply@polhode.example>' };

  it('is read whole', () => {
    const read = readEnv({ ...all, APP_URL: 'https://polhode.example/', TRUSTED_PROXIES: '10.0.0.0/8, ::1' });
    expect(read.APP_URL).toBe('https://polhode.example');
    expect(read.TRUSTED_PROXIES).toEqual(['10.0.0.0/8', '::1']);
  });

  it('trusts no proxy by default', () => {
    expect(readEnv(all).TRUSTED_PROXIES).toEqual([]);
  });

  it('names everything that is missing or wrong at once, and no value that may be secret', () => {
    const read = () =>
      readEnv({
        ...all,
        DATABASE_URL: undefined,
        APP_URL: 'polhode.example',
        SMTP_URL: 'http://user:hush@x',
      });
    expect(read).toThrow(
      /DATABASE_URL is not set; APP_URL must be an address.*; SMTP_URL must be an address/,
    );
    expect(read).not.toThrow(/hush/);
  });

  it('takes no APP_URL with a path, for links would lose it', () => {
    expect(() => readEnv({ ...all, APP_URL: 'https://x.example/polhode' })).toThrow('must have no path');
  });
});
