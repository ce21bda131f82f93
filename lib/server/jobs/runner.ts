import { EventEmitter } from 'node:events';
import {
  type Runner,
  type TaskList,
  type WorkerEvents,
  type CronItem,
  Logger,
  makeWorkerUtils,
  parseCronItems,
  run,
} from 'graphile-worker';
import type pg from 'pg';
import { type Db } from '@/db/client';
import { log } from '@/lib/server/log';
import { type Lease, registerWorker, releaseDeadWorkers, takeLease } from './leases';

/** How often a living process looks for the jobs of dead ones. */
const RESCUE_EVERY_MS = 15_000;

export interface JobRunner {
  stop(): Promise<void>;
}

/**
 * Runs the queue's jobs in this process. Any number of processes may share one database; the jobs of a process that died are
 * given back within `RESCUE_EVERY_MS`, at once when this one starts.
 */
export async function startRunner(options: {
  readonly databaseUrl: string;
  readonly pool: pg.Pool;
  readonly db: Db;
  readonly tasks: TaskList;
  readonly cron?: readonly CronItem[];
  readonly concurrency?: number;
}): Promise<JobRunner> {
  const { pool, db, tasks } = options;
  const lease = await takeLease(options.databaseUrl, (error) => log.warn({ err: error }, 'job lease lost'));
  const utils = await makeWorkerUtils({ pgPool: pool, logger: quiet });
  const rescue = async (): Promise<void> => {
    const rescued = await releaseDeadWorkers(db, utils);
    if (rescued > 0) log.info({ workers: rescued }, 'gave back the jobs of dead workers');
  };
  await rescue();
  const runner = await run({
    pgPool: pool,
    taskList: tasks,
    concurrency: options.concurrency ?? 2,
    noHandleSignals: true,
    parsedCronItems: parseCronItems([...(options.cron ?? [])]),
    pollInterval: 1000,
    logger: quiet,
    events: registering(db, lease),
  });
  const timer = setInterval(() => {
    rescue().catch((error: unknown) => log.error({ err: error }, 'could not look for dead workers'));
  }, RESCUE_EVERY_MS);
  timer.unref();
  return { stop: () => stop(runner, timer, lease, utils) };
}

/** Registers the pool of workers as it is made: jobs are locked by its name, and nobody may lock one whom nobody knows. */
function registering(db: Db, lease: Lease): WorkerEvents {
  const events: WorkerEvents = new EventEmitter();
  events.on('pool:create', ({ workerPool }) => {
    registerWorker(db, workerPool.id, lease.number).catch((error: unknown) =>
      log.error({ err: error }, 'could not register the workers'),
    );
  });
  return events;
}

async function stop(
  runner: Runner,
  timer: NodeJS.Timeout,
  lease: Lease,
  utils: Awaited<ReturnType<typeof makeWorkerUtils>>,
): Promise<void> {
  clearInterval(timer);
  await runner.stop();
  await utils.release();
  await lease.release();
}

const quiet = new Logger((scope) => (level, message) => {
  if (level === 'error')
    log.error({ worker: scope.workerId, task: scope.taskIdentifier, job: scope.jobId }, message);
  else if (level === 'warning') log.warn({ worker: scope.workerId, task: scope.taskIdentifier }, message);
});
