import { type Db } from '@/db/client';
import { issueOfSubmission } from '@/db/queries/baseline-history';
import { framesWithIssue } from '@/db/queries/program-frames';
import { namedFormer } from './named-former';
import { type ComparableResult, resultInIssue } from '@/lib/loading/result-in-issue';

export interface FormerResult {
  /** In the issue asked for; null where nobody knows how the two issues lie against each other. */
  readonly result: ComparableResult | null;
  /** Number of the frame issue that it stands in, where that is another one; null where it is the same. */
  readonly convertedFrom: number | null;
}

/**
 * The results of a submission as they stand in a frame issue, to be held against those of the later submission `laterId` in it; groups
 * by the names of that one.
 */
export async function formerResultIn(
  db: Db,
  submissionId: string,
  frameIssueId: string,
  laterId: string,
): Promise<FormerResult> {
  const [stored, frames, statedIn] = await Promise.all([
    namedFormer(db, submissionId, laterId),
    framesWithIssue(db, frameIssueId),
    issueOfSubmission(db, submissionId),
  ]);
  if (statedIn === frameIssueId) return { result: stored, convertedFrom: null };
  const conversion = frames.between(statedIn, frameIssueId);
  return {
    result: conversion === null ? null : resultInIssue(stored, conversion),
    convertedFrom: frames.issue(statedIn).number,
  };
}

/** What a page says of it beside a comparison; null where nothing was converted. */
export function formerInWords(name: string, { result, convertedFrom }: FormerResult): string | null {
  if (convertedFrom === null) return null;
  return result === null
    ? `${name} stands in frame issue ${convertedFrom}, and an issue between does not say how the one before lies in it: there is nothing to compare with.`
    : `${name} stands in frame issue ${convertedFrom}; its figures are converted, so that what differs is the aircraft and not the frame.`;
}
