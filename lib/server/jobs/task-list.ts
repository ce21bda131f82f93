import { type CronItem, type TaskList } from 'graphile-worker';
import { type JobPayloads } from './payloads';
import { importListTask } from './tasks/import-list';
import { sendLinkMailTask } from './tasks/send-link-mail';
import { sendMailTask } from './tasks/send-mail';
import { sweepTask } from './tasks/sweep';

const QUEUED = {
  'send-mail': sendMailTask,
  'send-link-mail': sendLinkMailTask,
  'import-list': importListTask,
} satisfies Record<keyof JobPayloads, TaskList[string]>;

/** Every task that the queue may call, by its name. */
export const TASKS: TaskList = { ...QUEUED, sweep: sweepTask };

/** What runs by the clock (UTC). */
export const CRON: readonly CronItem[] = [{ task: 'sweep', match: '17 * * * *', identifier: 'sweep' }];
