import pino from 'pino';

/** Names whose values never reach a log, at the top of a record or one and two levels down. */
const SECRET = [
  'password',
  'newPassword',
  'passwordHash',
  'token',
  'secret',
  'cookie',
  'set-cookie',
  'authorization',
  'body',
  'session',
  'sessionId',
];

const quoted = SECRET.map((name) => `["${name}"]`);

/** What a logger of ours is set to: levels, redaction. Apart, so that tests can look at what it writes. */
export const LOG_OPTIONS = {
  base: null,
  redact: {
    paths: [...quoted, ...quoted.map((name) => `*${name}`), ...quoted.map((name) => `*.*${name}`)],
    censor: '[redacted]',
  },
} satisfies pino.LoggerOptions;

/** The server's log: JSON lines on standard output. LOG_LEVEL sets the level, `info` without it. */
export const log = pino({ ...LOG_OPTIONS, level: process.env['LOG_LEVEL'] ?? 'info' });
