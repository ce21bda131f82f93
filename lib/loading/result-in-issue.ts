import { airframeToBody } from '@/lib/frames/body';
import { applyMat, multiply, transpose } from '@/lib/numerics/mat3';
import { congruence } from '@/lib/numerics/sym3';
import { momentsOf, tensorOf } from '@/lib/frames/products';
import { AccountSum } from '@/lib/mass/account';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type IssueConversion } from '@/lib/mass/issue-conversion';
import { resultOf } from '@/lib/mass/result';
import { accountOfItem, type GroupTotal, type OnBoardItem, type RollUp } from '@/lib/mass/roll-up';

import { type ConditionResult, type ConfigurationResult, type PointResult } from './configuration';

/** What of a result can be held against another's. */
export interface ComparableResult {
  readonly geometry: AirframeGeometry;
  readonly conditions: readonly Pick<ConditionResult, 'code' | 'title' | 'items' | 'rollUp'>[];
  readonly operatingPoints: readonly (Pick<PointResult, 'code' | 'title'> & {
    readonly momentum: Pick<PointResult['momentum'], 'total'>;
  })[];
}

/**
 * A stored result as it stands in another frame issue: CG from its datum, chord and body axes as that issue has them. Held against a
 * result of that issue, what differs is the aircraft and not the frame.
 */
export function resultInIssue(result: ConfigurationResult, conversion: IssueConversion): ComparableResult {
  if (conversion.isSame) return result;
  const { from, to, change } = conversion;
  // Body axes of the one issue to those of the other: both are right-handed.
  const turn = multiply(
    airframeToBody(to.axes, to.incidence),
    multiply(change.matrix, transpose(airframeToBody(from.axes, from.incidence))),
  );
  return {
    geometry: to,
    conditions: result.conditions.map(({ code, title, items, rollUp }) => {
      const moved = items.map((item) => itemInIssue(item, conversion));
      return { code, title, items: moved, rollUp: rollUpInIssue(rollUp, moved, conversion) };
    }),
    operatingPoints: result.operatingPoints.map(({ code, title, momentum }) => ({
      code,
      title,
      momentum: { total: applyMat(turn, momentum.total) },
    })),
  };
}

function itemInIssue(item: OnBoardItem, conversion: IssueConversion): OnBoardItem {
  const moved = { ...item, position: conversion.place(item.position) };
  return item.moments === undefined
    ? moved
    : { ...moved, moments: momentsOf(congruence(conversion.change.matrix, tensorOf(item.moments))) };
}

function rollUpInIssue(rollUp: RollUp, items: readonly OnBoardItem[], conversion: IssueConversion): RollUp {
  const { to } = conversion;
  const onBoard = new AccountSum();
  for (const item of items) onBoard.add(accountOfItem(item, to));
  const inIssue = <T extends Pick<GroupTotal, 'basicAccount' | 'predictedAccount'>>(total: T): T => {
    const [basicAccount, predictedAccount] = [
      conversion.account(total.basicAccount),
      conversion.account(total.predictedAccount),
    ];
    return {
      ...total,
      basicAccount,
      predictedAccount,
      basic: resultOf(basicAccount, to),
      predicted: resultOf(predictedAccount, to),
    };
  };
  return {
    ...inIssue(rollUp),
    groups: rollUp.groups.map(inIssue),
    onBoard: resultOf(onBoard.account, to),
  };
}
