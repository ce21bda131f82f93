import { type Db } from '../client';

export interface Waiting {
  /** Lists whose newest file was refused. */
  readonly listsWithProblems: number;
  /** Configurations without a roll-up of what they now hold. */
  readonly configurationsToRollUp: number;
  /** Submissions that nobody has signed or returned yet. */
  readonly submissionsToDecide: number;
}

/** What waits at the stations of a program. */
export async function whatWaits(db: Db, programId: string): Promise<Waiting> {
  const { lists, configurations, submissions } = await db
    .selectNoFrom((eb) => [
      eb
        .selectFrom('lists')
        .innerJoinLateral(
          (inner) =>
            inner
              .selectFrom('imports')
              .select('imports.state')
              .whereRef('imports.list_id', '=', 'lists.id')
              .orderBy('imports.created_at', 'desc')
              .limit(1)
              .as('newest'),
          (join) => join.onTrue(),
        )
        .where('lists.program_id', '=', programId)
        .where('newest.state', '=', 'failed')
        .select((inner) => inner.fn.countAll<number>().as('count'))
        .$asScalar()
        .$notNull()
        .as('lists'),
      eb
        .selectFrom('configurations')
        .where('configurations.program_id', '=', programId)
        .where(({ not, exists, selectFrom }) =>
          not(
            exists(
              selectFrom('roll_ups')
                .select('roll_ups.id')
                .whereRef('roll_ups.configuration_id', '=', 'configurations.id')
                .whereRef('roll_ups.configuration_version', '=', 'configurations.version'),
            ),
          ),
        )
        .select((inner) => inner.fn.countAll<number>().as('count'))
        .$asScalar()
        .$notNull()
        .as('configurations'),
      eb
        .selectFrom('submissions')
        .leftJoin('decisions', 'decisions.submission_id', 'submissions.id')
        .where('submissions.program_id', '=', programId)
        .where('decisions.submission_id', 'is', null)
        .select((inner) => inner.fn.countAll<number>().as('count'))
        .$asScalar()
        .$notNull()
        .as('submissions'),
    ])
    .executeTakeFirstOrThrow();
  return {
    listsWithProblems: lists,
    configurationsToRollUp: configurations,
    submissionsToDecide: submissions,
  };
}

/** The markings that lists of a program carry, each once. */
export async function markingsOf(db: Db, programId: string): Promise<string[]> {
  const rows = await db
    .selectFrom('lists')
    .select('marking')
    .distinct()
    .where('program_id', '=', programId)
    .where('marking', 'is not', null)
    .orderBy('marking')
    .$narrowType<{ marking: string }>()
    .execute();
  return rows.map(({ marking }) => marking);
}
