import { serverDb, serverPool } from '@/lib/server/database';
import { loadDemo } from '@/lib/server/demo/load-demo';

const password = process.env['DEMO_PASSWORD'];
if (!password) throw new Error('DEMO_PASSWORD is not set: the demo people need a password.');
await loadDemo({ db: serverDb(), pool: serverPool(), password });
await serverDb().destroy();
