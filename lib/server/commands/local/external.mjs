import { Failure } from './failure.mjs';

/** The settings of a deployment. Any of them present means that the services are given, and no local one is started. */
const NEEDED = [
  'DATABASE_URL',
  'MIGRATION_DATABASE_URL',
  'APP_URL',
  'S3_ENDPOINT',
  'S3_REGION',
  'S3_BUCKET',
  'S3_ACCESS_KEY_ID',
  'S3_SECRET_ACCESS_KEY',
  'SMTP_URL',
];

/**
 * The settings of the given services, or null if none is set; a Failure that names the missing ones if some are.
 * @param {Readonly<Record<string, string | undefined>>} source
 * @returns {Record<string, string> | null}
 */
export function externalSettings(source) {
  const missing = NEEDED.filter((name) => !source[name]);
  if (missing.length === NEEDED.length) return null;
  if (missing.length > 0) {
    throw new Failure(
      `Not set: ${missing.join(', ')}. With services of your own set all of ${NEEDED.join(', ')}; ` +
        `without any of them local ones are started.`,
    );
  }
  const settings = Object.fromEntries(NEEDED.map((name) => [name, source[name] ?? '']));
  if (!URL.canParse(settings.APP_URL)) {
    throw new Failure(`APP_URL is not an address: ${JSON.stringify(settings.APP_URL)}.`);
  }
  return {
    ...settings,
    MAIL_FROM: source.MAIL_FROM || `Polhode <no-reply@${new URL(settings.APP_URL).hostname}>`,
  };
}
