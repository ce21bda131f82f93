import { serverDb } from '@/lib/server/database';
import { verifyEverything } from '@/lib/server/baselines/verify';
import { findLocalServices } from './local-env';

findLocalServices();
const { baselines, revisions, auditEvents, breaches } = await serverDb()
  .transaction()
  .setIsolationLevel('repeatable read')
  .execute(verifyEverything);
await serverDb().destroy();
for (const { what, detail } of breaches) console.log(`does not hold: ${what}: ${detail}`);
console.log(
  `${baselines} baselines, ${revisions} list revisions and ${auditEvents} audit events recomputed: ` +
    (breaches.length === 0 ? 'everything holds.' : `${breaches.length} do not hold.`),
);
if (breaches.length > 0) process.exitCode = 1;
