import { AppError } from '@/lib/errors';
import { type WrongList } from '@/lib/ingest/roll-up-list';

/** The errors of a file as an answer: the first 200 with their places, and in words how many there are of each kind. */
export function wrongFile({ problems, problemCounts }: WrongList): AppError {
  const kinds = Object.entries(problemCounts).sort(([, a], [, b]) => b - a);
  const total = kinds.reduce((sum, [, count]) => sum + count, 0);
  const listed = total > problems.length ? ` The first ${problems.length} are listed.` : '';
  const counts = kinds.map(([kind, count]) => `${count} ${kind}`).join(', ');
  const message = `The file has ${total === 1 ? '1 error' : `${total} errors`}: ${counts}.${listed}`;
  return new AppError('invalid-input', message, { errors: problems });
}
