import { type Db } from '@/db/client';
import { findBaseline, lockBaselines } from '@/db/queries/baselines';
import { AppError } from '@/lib/errors';
import { type Person } from '@/lib/server/actor';
import { recordEvent } from '@/lib/server/audit/record-event';
import { mailPeople } from './mail-people';
import { refusalOf } from './refusals';

export interface WithdrawBaseline {
  readonly person: Person;
  readonly program: { readonly id: string; readonly code: string; readonly title: string };
  readonly number: number;
  readonly reason: string;
}

/**
 * Withdraws a signed baseline, current or superseded. What was signed stays as it is; a later row says that it is not to be used.
 * @throws AppError conflict when it is withdrawn already.
 */
export async function withdrawBaseline(db: Db, input: WithdrawBaseline): Promise<void> {
  const { person, program, number, reason } = input;
  try {
    await db.transaction().execute(async (trx) => {
      await lockBaselines(trx, program.id);
      const baseline = await findBaseline(trx, program.id, number);
      if (baseline === undefined) throw new AppError('not-found', `There is no baseline ${number}.`);
      if (baseline.state === 'withdrawn')
        throw new AppError(
          'conflict',
          `Baseline ${number} was withdrawn by ${baseline.withdrawer ?? 'someone'} already.`,
        );
      await trx
        .insertInto('withdrawals')
        .values({ program_id: program.id, number, reason, withdrawn_by: person.userId })
        .execute();
      await recordEvent(trx, {
        scope: program.id,
        actor: person,
        kind: 'baseline.withdrawn',
        subject: `baseline ${number}`,
        detail: { number, reason },
      });
      await mailPeople(trx, {
        programId: program.id,
        roles: ['chief', 'weights', 'simulation'],
        except: person.userId,
        isDecision: true,
        subject: `${program.title}: baseline ${number} is withdrawn`,
        blocks: [
          { kind: 'heading', text: `Baseline ${number}, "${baseline.title}", is withdrawn` },
          { kind: 'paragraph', text: `Do not use it any longer. Reason: ${reason}` },
          {
            kind: 'link',
            label: `Open baseline ${number}`,
            path: `/programs/${program.code}/baselines/${number}`,
          },
        ],
      });
    });
  } catch (error) {
    throw refusalOf(error);
  }
}
