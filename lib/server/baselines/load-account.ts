import { type Db } from '@/db/client';
import { issueOfSubmission, resultOfSubmission } from '@/db/queries/baseline-history';
import {
  accountRefusal,
  type AccountQuantity,
  type MassAccount,
  massAccount,
} from '@/lib/baselines/mass-account';
import { type ConditionResult } from '@/lib/loading/configuration';
import { formerInWords, formerResultIn } from './former-result';
import { loadSides } from './load-sides';

type Asked = string | readonly string[] | undefined;

export interface SideNumbers {
  readonly from: number;
  readonly to: number;
}

/**
 * The numbers that an address names. Left out, `to` is the newest baseline and `from` the one that it superseded, or else the one
 * before it. Null where nothing is signed.
 */
export function namesSides(
  newestFirst: readonly { readonly number: number; readonly supersedes: number | null }[],
  asked: { readonly from?: Asked; readonly to?: Asked },
): SideNumbers | null {
  const numberOf = (text: Asked): number | null =>
    typeof text === 'string' && /^[1-9]\d{0,8}$/.test(text) ? Number(text) : null;
  const to = numberOf(asked.to) ?? newestFirst[0]?.number;
  if (to === undefined) return null;
  const former = newestFirst.find(({ number }) => number === to)?.supersedes ?? Math.max(1, to - 1);
  return { from: numberOf(asked.from) ?? former, to };
}

export type AccountOutcome = { readonly account: MassAccount } | { readonly refused: string };

/**
 * The account of a quantity in one condition from one signed baseline to another.
 * @throws AppError not-found when one of them is not there.
 */
export async function loadAccount(
  db: Db,
  programId: string,
  input: SideNumbers & {
    readonly condition: Asked;
    readonly quantity: AccountQuantity;
    readonly within: string | null;
  },
): Promise<{
  readonly conditions: readonly ConditionResult[];
  readonly condition: ConditionResult | null;
  readonly outcome: AccountOutcome;
  /** What was converted to compare, in words; null where nothing was. */
  readonly converted: string | null;
}> {
  const { quantity, within } = input;
  const { before, after } = await loadSides(db, programId, {
    from: String(input.from),
    to: String(input.to),
  });
  const [old, now] = await Promise.all([
    before &&
      issueOfSubmission(db, after.submissionId).then((issue) =>
        formerResultIn(db, before.submissionId, issue, after.submissionId),
      ),
    resultOfSubmission(db, after.submissionId),
  ]);
  const { conditions } = now;
  const condition = conditions.find(({ code }) => code === input.condition) ?? conditions[0] ?? null;
  const converted = old && formerInWords(`Baseline ${input.from}`, old);
  if (old?.result === null)
    return { conditions, condition, converted: null, outcome: { refused: converted ?? '' } };
  const former = old?.result.conditions.find(({ code }) => code === condition?.code);
  if (old === null || former === undefined || condition === null)
    return {
      conditions,
      condition,
      converted: null,
      outcome: { refused: `Baseline ${input.from} does not have this condition. Choose another.` },
    };
  const sides = [
    { geometry: old.result.geometry, condition: former },
    { geometry: now.geometry, condition },
  ] as const;
  const refused = accountRefusal(...sides, quantity);
  return {
    conditions,
    condition,
    converted,
    outcome: refused === null ? { account: massAccount(...sides, quantity, within) } : { refused },
  };
}
