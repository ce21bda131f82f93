import { type Task } from 'graphile-worker';
import { deleteExpired } from '@/db/queries/sessions';
import { serverDb } from '@/lib/server/database';

/** Removes what has run out. */
export const sweepTask: Task = () => deleteExpired(serverDb(), new Date());
