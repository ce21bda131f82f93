import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findBaseline } from '@/db/queries/baselines';
import { findingKey } from '@/lib/baselines/finding-key';
import { inUnits } from '@/lib/baselines/document-units';
import { readStoredDocument } from '@/lib/baselines/stored-document';
import { baselineDocumentSchema } from '@/lib/contracts/api/baseline-document';
import { NO_POSE } from '@/lib/frames/pose';
import { loadAccount } from '@/lib/server/baselines/load-account';
import { loadReview } from '@/lib/server/baselines/load-review';
import { loadWaiting } from '@/lib/server/baselines/load-waiting';
import { signSubmission } from '@/lib/server/baselines/sign-submission';
import { submitConfiguration } from '@/lib/server/baselines/submit-configuration';
import { verifyEverything } from '@/lib/server/baselines/verify';
import { submissionsOfProgram } from '@/db/queries/baselines';
import { chooseFrame } from '@/lib/server/configurations/choose-frame';
import { reachConfiguration } from '@/lib/server/configurations/reach-configuration';
import { evaluate } from '@/lib/server/configurations/roll-up-configuration';
import { issueFrame } from '@/lib/server/programs/issue-frame';
import { baselineSource } from '@/lib/server/three-views/sources';
import { radians } from '@/lib/units/convert';
import { type ProgramUnderTest, programUnderTest } from '@/tests/support/program';
import { fillProgram, signed } from '@/tests/support/signed';

let test: ProgramUnderTest;
let submissionId: string;

/*
 * The same aircraft twice: signed in the first issue, then put into a second one, with its datum elsewhere, butt lines to the left
 * and a reference line laid two degrees nose-down, and submitted again.
 */
beforeAll(async () => {
  test = await programUnderTest();
  const { db, program, crew } = test;
  await fillProgram(test);
  await signed(test, { code: 'release', title: 'Release' });
  await issueFrame(db, {
    person: crew.chief,
    programId: program.id,
    base: 1,
    title: 'Second issue',
    geometry: {
      axes: ['aft', 'left', 'up'],
      lateralPlane: 0,
      incidence: radians(2),
      reference: [9, 0, 2],
      lemac: [8.5, 0, 2],
      mac: 2,
      span: 18,
      length: 15,
    },
    former: { ...NO_POSE, origin: [2.5, 0, 1], pitch: radians(2) },
    validFrom: '2026-02-01',
    reason: 'for the test',
    carryPoints: true,
  });
  const seen = await reach();
  await chooseFrame(db, { person: crew.weights, configuration: seen, version: seen.version, frameIssue: 2 });
  const configuration = await reach();
  const { findings } = await evaluate(db, configuration);
  submissionId = await submitConfiguration(db, {
    person: crew.weights,
    program,
    configuration,
    version: configuration.version,
    title: 'Release in the second issue',
    reason: 'for the test',
    answers: Object.fromEntries(findings.map((finding) => [findingKey(finding), 'Looked at, it is so.'])),
  });
});
afterAll(() => test.close());

const reach = () => reachConfiguration(test.db, test.program.id, 'release');

describe('a submission in a newer frame issue than the baseline it is held against', () => {
  it('shows that nothing of the aircraft changed, and says that the former figures were converted', async () => {
    const review = await loadReview(test.db, {
      programId: test.program.id,
      submissionId,
      reader: { userId: test.crew.chief.userId, role: 'chief' },
    });
    expect(review.formerConverted).toBe(
      'Baseline 1 stands in frame issue 1; its figures are converted, so that what differs is the aircraft and not the frame.',
    );
    for (const change of review.comparison.conditions) {
      const { mass, cg, inertia, inclination, percentMac, groups } = change;
      expect(mass.delta).toBe(0);
      for (const one of [cg.x, cg.y, cg.z, percentMac, inclination]) expect(one.delta).toBeCloseTo(0, 9);
      for (const one of Object.values(inertia))
        expect(Math.abs(one.delta ?? NaN)).toBeLessThan(1e-8 * (inertia.izz.after ?? NaN));
      expect(groups).toEqual([]);
    }
    for (const { h } of review.comparison.operatingPoints)
      for (const one of [h.x, h.y, h.z]) expect(one.delta).toBeCloseTo(0, 9);
    const [waiting] = await loadWaiting(
      test.db,
      (await submissionsOfProgram(test.db, test.program.id)).filter(({ id }) => id === submissionId),
    );
    expect(waiting?.change?.cg.x.delta).toBeCloseTo(0, 9);
  });

  it('names in its document what was converted and how, in SI and in other units, and verifies', async () => {
    const { number } = await signSubmission(test.db, {
      person: test.crew.chief,
      program: test.program,
      submissionId,
    });
    const baseline = await findBaseline(test.db, test.program.id, number);
    const document = readStoredDocument(baseline?.document ?? '');
    expect(document.conventions.frameIssue).toBe('2: Second issue');
    const [c, s] = [Math.cos(radians(2)), Math.sin(radians(2))];
    // Old axes in the components of the second issue: pitched about its y, which points left; the old y points right.
    const matrix = [
      [c, 0, s],
      [0, -1, 0],
      [-s, 0, c],
    ];
    expect(document.sources).toHaveLength(2);
    for (const { converted } of document.sources) {
      expect(converted?.frameIssue).toBe('1: First issue');
      expect(converted?.datum.airframe).toEqual({ x: 2.5, y: 0, z: 1 });
      converted?.matrix.forEach((row, i) =>
        row.forEach((part, k) => expect(part).toBeCloseTo(matrix[i]?.[k] ?? NaN, 14)),
      );
    }
    const whole = { ...document, digest: baseline?.digest, state: 'current' };
    expect(baselineDocumentSchema.safeParse(whole).error).toBeUndefined();
    const us = inUnits(document, 'us').sources[0]?.converted;
    // 1 in = 0.0254 m exactly (NIST SP 811).
    expect(us?.datum.airframe.x).toBeCloseTo(2.5 / 0.0254, 10);
    expect(us?.matrix[1]?.[1]).toBe(-1);
    const former = await findBaseline(test.db, test.program.id, 1);
    expect(readStoredDocument(former?.document ?? '').sources.some((source) => 'converted' in source)).toBe(
      false,
    );
    expect((await verifyEverything(test.db)).breaches).toEqual([]);
  });

  it('can be accounted for by group across the issues', async () => {
    const { outcome, converted } = await loadAccount(test.db, test.program.id, {
      from: 1,
      to: 2,
      condition: undefined,
      quantity: 'cgx',
      within: null,
    });
    expect(converted).toContain('frame issue 1');
    if (!('account' in outcome)) throw new Error(outcome.refused);
    expect(outcome.account.after - outcome.account.before).toBeCloseTo(0, 10);
  });

  it('draws its rows in its own issue, the former baseline in the former', async () => {
    const [old, now] = await Promise.all(
      ['1', '2'].map((number) => baselineSource(test.db, test.program.id, number)),
    );
    expect(old?.revisions.map(({ conversion }) => conversion.isSame)).toEqual([true, true]);
    expect(now?.revisions.map(({ conversion }) => conversion.isSame)).toEqual([false, false]);
    const mass = (source: typeof now) =>
      source?.subtotals.reduce((sum, part) => sum + part.basic.mass, 0) ?? NaN;
    expect(mass(now)).toBeCloseTo(mass(old), 9);
  });
});
