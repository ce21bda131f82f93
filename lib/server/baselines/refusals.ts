import pg from 'pg';
import { AppError } from '@/lib/errors';

/** What the database's own rules on decisions mean to the person who met them. */
const SENTENCES: Readonly<Record<string, string>> = {
  decisions_not_own: 'You submitted this configuration, so another chief engineer has to sign it.',
  decisions_not_author:
    'You made a list revision or the rotating parts that this configuration holds, so another chief engineer has to sign it.',
  decisions_chief: 'Only a chief engineer of the program decides on a submission.',
  withdrawals_chief: 'Only a chief engineer of the program withdraws a baseline.',
};

/** Turns a refusal of PostgreSQL into one for people; passes every other error on. */
export function refusalOf(error: unknown): unknown {
  if (!(error instanceof pg.DatabaseError)) return error;
  if (error.constraint === 'decisions_pkey')
    return new AppError(
      'conflict',
      'Another chief engineer has just decided on this submission. Nothing of yours was kept.',
      {
        cause: error,
      },
    );
  if (error.constraint === 'withdrawals_pkey')
    return new AppError('conflict', 'This baseline has just been withdrawn by someone else.', {
      cause: error,
    });
  const sentence = SENTENCES[error.constraint ?? ''];
  return sentence === undefined ? error : new AppError('forbidden', sentence, { cause: error });
}
