import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findConfiguration, pinnedRevisions } from '@/db/queries/configurations';
import { lastSubmissionOf, leftOutOf, massHistory } from '@/db/queries/baseline-history';
import { findSubmission, submissionsOfProgram } from '@/db/queries/baselines';
import { choicesOf, countEvents, eventsOf } from '@/db/queries/trail';
import { submitFormSchema } from '@/lib/contracts/baselines';
import { findingKey } from '@/lib/baselines/finding-key';
import { AppError } from '@/lib/errors';
import { hashPassword } from '@/lib/server/auth/password';
import { loadAccount, namesSides } from '@/lib/server/baselines/load-account';
import { loadReview } from '@/lib/server/baselines/load-review';
import { loadSides } from '@/lib/server/baselines/load-sides';
import { loadSigned } from '@/lib/server/baselines/load-signed';
import { loadWaiting } from '@/lib/server/baselines/load-waiting';
import { countPairs, revisionPairs, rowsOfPair } from '@/lib/server/baselines/revision-changes';
import { signSubmission } from '@/lib/server/baselines/sign-submission';
import { signWithPassword } from '@/lib/server/baselines/sign-with-password';
import { submitForm } from '@/lib/server/baselines/submit-form';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { pinRevisions } from '@/lib/server/configurations/pin-revisions';
import { evaluate } from '@/lib/server/configurations/roll-up-configuration';
import { RATE_POLICIES } from '@/lib/server/rate-limit/policies';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

/** The radar is heavy for its list and states no moments: a warning. */
const BODY = `item,group,mass,x,y,z,ixx,iyy,izz,ixz,maturity
shell,Body/Skin,900,6.6,0,1.4,500,4200,4300,-120,C
radar,Avionics/Radar,120,2.1,0,1.2,0,0,0,0,E
`;
const BODY_NEXT = `item,group,mass,x,y,z,ixx,iyy,izz,ixz,maturity
shell,Body/Skin,905,6.6,0,1.4,500,4200,4300,-120,C
radar,Avionics/Radar,120,2.4,0,1.2,0,0,0,0,E
doubler,Body/Skin,2,6.0,0,1.1,0.1,0.1,0.1,0,E
`;
const PASSWORD = 'a long password of the chief';

let test: ProgramUnderTest;
let first: string;

beforeAll(async () => {
  test = await programUnderTest();
  const { db, crew, program } = test;
  await reviseList(test, crew.weights, 'body', BODY);
  await createConfiguration(db, {
    person: crew.weights,
    programId: program.id,
    buildCode: 'design',
    code: 'release',
    title: 'Release',
  });
  await db
    .updateTable('users')
    .set({ password_hash: await hashPassword(PASSWORD) })
    .where('id', '=', crew.chief.userId)
    .execute();
});

afterAll(() => test.close());

async function configuration() {
  const found = await findConfiguration(test.db, test.program.id, 'release');
  if (found === undefined) throw new Error('no configuration');
  return found;
}

/** What the browser sends: a `finding.N` and an `answer.N` for each warning. */
async function filledForm(answer: string) {
  const now = await configuration();
  const { findings } = await evaluate(test.db, now);
  const warnings = findings.filter(({ severity }) => severity === 'warning');
  expect(warnings.length).toBeGreaterThan(0);
  return submitFormSchema.parse({
    program: test.program.code,
    configuration: 'release',
    version: String(now.version),
    title: 'First release',
    reason: 'for the simulator',
    ...Object.fromEntries(
      warnings.flatMap((warning, index) => [
        [`finding.${index}`, findingKey(warning)],
        [`answer.${index}`, answer],
      ]),
    ),
  });
}

describe('the form that submits', () => {
  it('says of each warning without an answer at which field it is missing, and submits nothing', async () => {
    const { db, program, crew } = test;
    const refused = await submitForm(db, crew.weights, program, await filledForm(' ')).catch(
      (error: unknown) => error,
    );
    expect(refused).toBeInstanceOf(AppError);
    expect(refused).toMatchObject({ code: 'invalid-input', errors: [{ pointer: '/answer.0' }] });
    expect(await lastSubmissionOf(db, (await configuration()).id)).toBeUndefined();
  });

  it('refuses an answer that is too long at its field', async () => {
    const { db, program, crew } = test;
    await expect(
      submitForm(db, crew.weights, program, await filledForm('x'.repeat(1001))),
    ).rejects.toMatchObject({ errors: [{ pointer: '/answer.0' }] });
  });

  it('tells to load the page again when there are warnings that it did not show', async () => {
    const { db, program, crew } = test;
    const form = await filledForm('known');
    await expect(submitForm(db, crew.weights, program, { ...form, answers: [] })).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('Load it again') as string,
    });
  });

  it('keeps the answers with the submission, where the next form finds them', async () => {
    const { db, program, crew } = test;
    first = await submitForm(db, crew.weights, program, await filledForm('  its own is small  '));
    const submission = await findSubmission(db, program.id, first);
    expect(Object.values(submission?.answers ?? {})).toEqual(['its own is small']);
    const last = await lastSubmissionOf(db, (await configuration()).id);
    expect(last).toMatchObject({ id: first, decision: null, answers: submission?.answers });
  });
});

describe('a signature', () => {
  const sign = (password: string, seen = { number: 1, supersedes: null as number | null }) =>
    signWithPassword(test.db, {
      person: test.crew.chief,
      program: test.program,
      submissionId: first,
      seen,
      password,
    });

  it('needs the right password, and tells a wrong one at its field', async () => {
    await expect(sign('not this one')).rejects.toMatchObject({
      code: 'invalid-input',
      errors: [{ pointer: '/password' }],
    });
    expect((await findSubmission(test.db, test.program.id, first))?.decision).toBeNull();
  });

  it.each([
    { number: 2, supersedes: null },
    { number: 1, supersedes: 1 },
  ])('does what its page said, or nothing: %o', async (seen) => {
    await expect(sign(PASSWORD, seen)).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('this would be baseline 1 now and supersede none') as string,
    });
    expect((await findSubmission(test.db, test.program.id, first))?.decision).toBeNull();
  });

  it('is given with it, and shows every number of the stored document', async () => {
    const { number, digest } = await sign(PASSWORD);
    expect(number).toBe(1);
    const signed = await loadSigned(test.db, test.program.id, '1');
    expect(signed.baseline.digest).toBe(digest);
    expect(signed.document.conditions[0]?.mass).toBe(1020);
    expect(signed.preparedBy).toEqual(['weights']);
    const warning = signed.document.findings.findIndex(({ severity }) => severity === 'warning');
    expect(signed.document.findings[warning]?.answer).toBe('its own is small');
    expect(signed.whereOf(warning)).toBe('List body, revision 1');
  });

  it('is told apart from guessing: after too many wrong passwords none is taken', async () => {
    const guesses = Array.from({ length: RATE_POLICIES.passwordAccount.quota }, () => sign('guess'));
    await Promise.allSettled(guesses);
    await expect(sign(PASSWORD)).rejects.toMatchObject({ code: 'too-many-requests' });
  });

  it.each(['0', '01', 'x', '99', '1 or 1=1'])('is not found under the number %s', async (number) => {
    await expect(loadSigned(test.db, test.program.id, number)).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('a review', () => {
  let second: string;

  beforeAll(async () => {
    const { db, program, crew } = test;
    await reviseList(test, crew.weights2, 'body', BODY_NEXT);
    const now = await configuration();
    await pinRevisions(db, {
      person: crew.weights,
      configuration: now,
      version: now.version,
      revisions: { body: 2 },
      rotors: null,
    });
    second = await submitForm(db, crew.weights, program, await filledForm('as before'));
  });

  const review = (userId: string, role: 'chief' | 'weights' = 'chief') =>
    loadReview(test.db, {
      programId: test.program.id,
      submissionId: second,
      reader: { userId, role },
    });

  it('holds a submission against the current baseline of its build, down to the rows', async () => {
    const { former, comparison, lists, nextNumber, obstacles } = await review(test.crew.chief.userId);
    expect(former).toMatchObject({ number: 1, withdrawn: false });
    expect(nextNumber).toBe(2);
    expect(obstacles).toEqual([]);
    expect(comparison.conditions[0]?.mass).toEqual({ before: 1020, after: 1027, delta: 7 });
    expect(lists.map(({ list, counts }) => [list, counts])).toEqual([
      ['body', { added: 1, removed: 0, changed: 2 }],
    ]);
  });

  it('tells who may not sign why', async () => {
    expect((await review(test.crew.weights.userId, 'weights')).obstacles).toHaveLength(1);
    expect((await review(test.crew.weights2.userId)).obstacles).toEqual([
      expect.stringContaining('revision 2 of list body'),
    ]);
  });

  it('finds the rows behind the change of one group, in either revision', async () => {
    const { db, program } = test;
    const { before, after } = await loadSides(db, program.id, { from: '1', submission: second });
    const pairs = await revisionPairs(db, before?.submissionId ?? null, after.submissionId);
    const [pair] = await countPairs(db, pairs, 'Body');
    expect(pair?.counts).toEqual({ added: 1, removed: 0, changed: 1 });
    if (pair === undefined) throw new Error('no pair');
    const { rows } = await rowsOfPair(db, pair, { offset: 0, limit: 10, group: 'Body' });
    expect(rows.map(({ item, kind }) => [item, kind])).toEqual([
      ['shell', 'changed'],
      ['doubler', 'added'],
    ]);
    expect(rows[0]?.fields).toEqual([{ column: 'mass', before: 900, after: 905 }]);
    const [radar] = await countPairs(db, pairs, 'Avionics');
    expect(radar?.counts).toEqual({ added: 0, removed: 0, changed: 1 });
  });

  it('has every row of a list new without a former baseline, and gone without a later one', async () => {
    const { db, program } = test;
    const { after } = await loadSides(db, program.id, { from: '1', submission: second });
    const [pair] = await countPairs(db, await revisionPairs(db, null, after.submissionId));
    if (pair?.after == null) throw new Error('no pair');
    const all = pair.after.rows;
    expect(pair.counts).toEqual({ added: all, removed: 0, changed: 0 });
    const page = { offset: 0, limit: 50, group: null };
    const { rows } = await rowsOfPair(db, pair, page);
    expect(rows.map(({ kind }) => kind)).toEqual(Array.from({ length: all }, () => 'added'));
    expect(rows[0]?.fields.some(({ before, after: now }) => before === null && now !== null)).toBe(true);
    const gone = await rowsOfPair(db, { ...pair, before: pair.after, after: null }, page);
    expect(gone.counts).toEqual({ added: 0, removed: all, changed: 0 });
  });

  it('shows a chief what waits with what it changes', async () => {
    const listed = await submissionsOfProgram(test.db, test.program.id);
    const [waiting, ...others] = await loadWaiting(
      test.db,
      listed.filter(({ decision }) => decision === null),
    );
    expect(others).toEqual([]);
    expect(waiting?.submission.id).toBe(second);
    expect(waiting?.former?.number).toBe(1);
    expect(waiting?.change?.mass.delta).toBe(7);
  });

  it('once signed can be accounted for, group by group, and every baseline is in the history', async () => {
    const { db, program, crew } = test;
    await signSubmission(db, { person: crew.chief, program, submissionId: second });
    const sides = namesSides(
      [
        { number: 2, supersedes: 1 },
        { number: 1, supersedes: null },
      ],
      {},
    );
    expect(sides).toEqual({ from: 1, to: 2 });
    const { outcome, condition } = await loadAccount(db, program.id, {
      from: 1,
      to: 2,
      condition: undefined,
      quantity: 'mass',
      within: null,
    });
    if (!('account' in outcome) || condition === null) throw new Error('no account');
    expect(outcome.account.steps).toEqual([{ group: 'Body', deeper: true, from: 1020, to: 1027 }]);
    const cg = await loadAccount(db, program.id, {
      from: 1,
      to: 2,
      condition: condition.code,
      quantity: 'cgx',
      within: null,
    });
    if (!('account' in cg.outcome)) throw new Error('no account');
    expect(cg.outcome.account.steps.map(({ group }) => group)).toEqual(['Avionics', 'Body']);
    const history = await massHistory(db, program.id, condition.code);
    expect(history.map(({ number, state, mass }) => [number, state, mass])).toEqual([
      [1, 'superseded', 1020],
      [2, 'current', 1027],
    ]);
  });
});

describe('the trail', () => {
  it('is filtered by kind, person, day and part of the subject, which is taken as it is written', async () => {
    const { db, program, crew } = test;
    const nothing = { kind: null, person: null, from: null, before: null, subject: null };
    const all = await countEvents(db, program.id, nothing);
    const count = (said: Partial<Parameters<typeof countEvents>[2]>) =>
      countEvents(db, program.id, { ...nothing, ...said });
    expect(await count({ kind: 'baseline.signed' })).toBe(2);
    expect(await count({ person: crew.chief.userId })).toBe(3);
    expect(await count({ subject: 'BASELINE 2' })).toBe(1);
    expect(await count({ subject: '%' })).toBe(0);
    expect(await count({ before: new Date(0) })).toBe(0);
    expect(await count({ from: new Date(0) })).toBe(all);
    const events = await eventsOf(db, program.id, nothing, { offset: 0, limit: 2 });
    expect(events.map(({ number }) => number)).toEqual([all, all - 1]);
    const { kinds, people } = await choicesOf(db, program.id);
    expect(kinds).toContain('baseline.superseded');
    expect(people.map(({ name }) => name)).toEqual(['chief', 'weights', 'weights2']);
  });
});

describe('what a submission leaves out', () => {
  it('is counted by list and status: adjustments that are not approved', async () => {
    const { db, program, crew } = test;
    await reviseList(
      test,
      crew.weights,
      'changes',
      `item,group,mass,x,y,z,change_ref,status
a,Body,3,6,0,1,C-1,approved
b,Body,4,6,0,1,C-2,pending
c,Body,-1.5,6,0,1,C-3,potential
`,
      { kind: 'adjustments' },
    );
    await createConfiguration(db, {
      person: crew.weights,
      programId: program.id,
      buildCode: 'design',
      code: 'with-changes',
      title: 'With changes',
    });
    const found = await findConfiguration(db, program.id, 'with-changes');
    if (found === undefined) throw new Error('no configuration');
    await pinRevisions(db, {
      person: crew.weights,
      configuration: found,
      version: found.version,
      revisions: { body: 1, changes: 1 },
      rotors: null,
    });
    const pins = await pinnedRevisions(db, found.id);
    const revisions = pins.map((pin) => pin.revision_id);
    expect(await leftOutOf(db, revisions)).toEqual([
      { list: 'changes', status: 'pending', rows: 1, mass: 4 },
      { list: 'changes', status: 'potential', rows: 1, mass: -1.5 },
    ]);
  });
});
