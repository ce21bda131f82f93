import { createDb, createPool } from '@/db/client';
import { env } from '@/lib/server/env';
import { importFile } from '@/lib/server/lists/import-file';
import { openObject } from '@/lib/server/storage/open-object';

/*
 * Runs one import in a process of its own, as a worker does, and prints what it took: seconds of the clock and of this process's
 * processor, and the most by which the process grew.
 */
const pool = createPool(env().DATABASE_URL, 4, (error) => {
  throw error;
});
const db = createDb(pool);
const importId = process.argv[2] ?? '';

globalThis.gc?.();
const before = process.memoryUsage.rss();
let most = before;
const watch = setInterval(() => {
  most = Math.max(most, process.memoryUsage.rss());
}, 10);
const cpu = process.cpuUsage();
const start = performance.now();
await importFile({ pool, db, openObject: (sha256) => openObject(sha256) }, importId);
const seconds = (performance.now() - start) / 1000;
const { user, system } = process.cpuUsage(cpu);
clearInterval(watch);
await db.destroy();
console.log(JSON.stringify({ seconds, cpu: (user + system) / 1e6, grownMiB: (most - before) / 2 ** 20 }));
