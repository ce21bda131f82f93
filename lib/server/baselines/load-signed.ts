import { type Db } from '@/db/client';
import { findBaseline, findSubmission, revisionsOfSubmission } from '@/db/queries/baselines';
import { rotorsOfSubmission } from '@/db/queries/baseline-history';
import { type GroupChange, groupChanges } from '@/lib/baselines/compare';
import { readStoredDocument } from '@/lib/baselines/stored-document';
import { whereWords } from '@/lib/findings/where-words';
import { AppError } from '@/lib/errors';
import { namedFormer } from './named-former';

/**
 * A signed baseline: its stored document, what later events say of it, and what it changed by group against the one that it
 * superseded, per condition. `number` is as it stands in an address.
 * @throws AppError not-found
 */
export async function loadSigned(db: Db, programId: string, number: string) {
  const baseline = /^[1-9]\d{0,8}$/.test(number)
    ? await findBaseline(db, programId, Number(number))
    : undefined;
  const submission = baseline && (await findSubmission(db, programId, baseline.submission_id));
  if (baseline === undefined || submission === undefined)
    throw new AppError('not-found', 'There is no such baseline in this program.');
  const [revisions, rotors, former] = await Promise.all([
    revisionsOfSubmission(db, submission.id),
    rotorsOfSubmission(db, submission.id),
    baseline.supersedes === null ? undefined : findBaseline(db, programId, baseline.supersedes),
  ]);
  const formerResult = former && (await namedFormer(db, former.submission_id, submission.id));
  const changesOf = (condition: string): GroupChange[] => {
    const groups = (result: typeof submission.result) =>
      result.conditions.find(({ code }) => code === condition)?.rollUp.groups ?? [];
    return formerResult === undefined ? [] : groupChanges(groups(formerResult), groups(submission.result));
  };
  const titles = new Map([
    ...revisions.map((one) => [one.list_code, one.list_title] as const),
    ...submission.result.conditions.map((one) => [one.code, one.title] as const),
  ]);
  return {
    baseline,
    submission,
    document: readStoredDocument(baseline.document),
    preparedBy: [...new Set([...revisions, ...(rotors === null ? [] : [rotors])].map((one) => one.author))],
    rotors,
    markings: new Map(revisions.map((one) => [one.list_code, one.marking] as const)),
    changesOf,
    /** Where the finding at that place of the document was seen: the document keeps the order in which they were submitted. */
    whereOf: (index: number): string | null => {
      const finding = submission.findings[index];
      return finding === undefined ? null : whereWords(finding.where, titles);
    },
    pointTitles: new Map(submission.result.operatingPoints.map(({ code, title }) => [code, title] as const)),
  };
}
