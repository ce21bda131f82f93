import { type Db } from '@/db/client';

/** Among so many rows at the head of a list its example is sought. */
const LOOKED_AT = 60;

/**
 * A component that shows where the rows of a revision lie: the heaviest counted one near its head that is not at the origin of the
 * list. m, list axes. Undefined where there is none.
 */
export function exampleRow(db: Db, revisionId: string) {
  return db
    .selectFrom((eb) =>
      eb
        .selectFrom('mass_rows')
        .select(['item', 'x', 'y', 'z', 'pair', 'mass', 'counting'])
        .where('revision_id', '=', revisionId)
        .orderBy('position')
        .limit(LOOKED_AT)
        .as('head'),
    )
    .select(['item', 'x', 'y', 'z', 'pair'])
    .where('counting', '=', 'counted')
    .where((eb) => eb.or([eb('x', '<>', 0), eb('y', '<>', 0), eb('z', '<>', 0)]))
    .orderBy('mass', 'desc')
    .limit(1)
    .executeTakeFirst();
}
