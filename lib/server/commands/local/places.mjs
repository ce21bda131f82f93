import path from 'node:path';
import { fileURLToPath } from 'node:url';

/** The root of the clone, and the ignored folders in it. POLHODE_DATA puts the local data elsewhere. */
export const ROOT = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../../../..');
export const DATA = path.resolve(ROOT, process.env.POLHODE_DATA ?? '.data');
export const TEST_DATA = path.join(ROOT, '.test-data');

/** What other commands read to find the running local services: written by start, 0600, removed when it stops. */
export const LOCAL_ENV = path.join(DATA, 'local.env');
