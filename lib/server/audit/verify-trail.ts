import { type Db } from '@/db/client';
import { FIRST_HASH, hashEntry } from './record-event';

const PAGE = 2000;

/** Walks every chain of the trail and says where an event is missing, altered or out of its place. */
export async function verifyTrail(
  db: Db,
): Promise<{ events: number; breaches: { what: string; detail: string }[] }> {
  const heads = await db.selectFrom('audit_heads').selectAll().orderBy('scope').execute();
  const started = await db.selectFrom('audit_events').select('scope').distinct().execute();
  const breaches: { what: string; detail: string }[] = [];
  let events = 0;
  for (const scope of new Set([...heads, ...started].map((one) => one.scope))) {
    let previous = { number: 0, hash: FIRST_HASH };
    for (;;) {
      const page = await db
        .selectFrom('audit_events')
        .selectAll()
        .where('scope', '=', scope)
        .where('number', '>', previous.number)
        .orderBy('number')
        .limit(PAGE)
        .execute();
      for (const row of page) {
        const what = `audit event ${row.number} of ${scope}`;
        if (row.number !== previous.number + 1)
          breaches.push({ what, detail: `event ${previous.number + 1} is missing before it` });
        if (row.previous_hash !== previous.hash)
          breaches.push({ what, detail: 'it does not follow from the event before it' });
        const hash = hashEntry({
          scope: row.scope,
          number: row.number,
          at: row.at,
          userId: row.user_id,
          address: row.address,
          kind: row.kind,
          subject: row.subject,
          detail: row.detail,
          previousHash: row.previous_hash,
        });
        if (hash !== row.hash) breaches.push({ what, detail: 'its content does not match its hash' });
        previous = { number: row.number, hash: row.hash };
      }
      events += page.length;
      if (page.length < PAGE) break;
    }
    const head = heads.find((one) => one.scope === scope);
    if (head?.number !== previous.number || head.hash !== previous.hash)
      breaches.push({
        what: `audit trail of ${scope}`,
        detail: `it ends at event ${previous.number}, and should end at ${head?.number ?? 'none'} with the hash on record`,
      });
  }
  return { events, breaches };
}
