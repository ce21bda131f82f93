import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findBaseline, findSubmission } from '@/db/queries/baselines';
import { findConfiguration } from '@/db/queries/configurations';
import { changedSince } from '@/components/configurations/changed-since';
import { findingKey } from '@/lib/baselines/finding-key';
import { inUnits } from '@/lib/baselines/document-units';
import { keptStandings } from '@/lib/baselines/limit-members';
import { readStoredDocument } from '@/lib/baselines/stored-document';
import { baselineDocumentSchema } from '@/lib/contracts/api/baseline-document';
import { standingsOf } from '@/lib/loading/configuration';
import { type Limit } from '@/lib/loading/limits';
import { loadReview } from '@/lib/server/baselines/load-review';
import { loadSigned } from '@/lib/server/baselines/load-signed';
import { changeGroups } from '@/lib/server/programs/change-groups';
import { submitConfiguration } from '@/lib/server/baselines/submit-configuration';
import { verifyEverything } from '@/lib/server/baselines/verify';
import { evaluate } from '@/lib/server/configurations/roll-up-configuration';
import { removeLimit, stateLimit } from '@/lib/server/programs/set-limit';
import { type ProgramUnderTest, programUnderTest } from '@/tests/support/program';
import { fillProgram, signed, submitted } from '@/tests/support/signed';

const LIMIT: Omit<Limit, 'frameIssue'> = {
  kind: 'contract',
  quantity: 'mass',
  sense: 'at-most',
  value: 1200,
  group: '',
  condition: null,
  source: 'a contract',
  sourceDate: '2026-01-05',
  from: '2026-01-05',
  until: null,
};

let test: ProgramUnderTest;
let ids: string[];
const state = (limit: Partial<typeof LIMIT>, id: string | null = null) =>
  stateLimit(test.db, {
    person: test.crew.chief,
    programId: test.program.id,
    id,
    limit: { ...LIMIT, ...limit },
  });

beforeAll(async () => {
  test = await programUnderTest();
  await fillProgram(test);
  await signed(test, { code: 'before', title: 'Before any limit' });
  ids = [
    await state({ condition: 'ferry', value: 1400 }),
    await state({ kind: 'allocation', group: 'Wing', value: 390 }),
    await state({ kind: 'target', quantity: 'percentMac', value: 95 }),
    await state({ until: '2026-01-06', value: 1 }),
  ];
  await signed(test, { code: 'judged', title: 'Under limits' });
});
afterAll(() => test.close());

const documentOf = async (number: number) => {
  const baseline = await findBaseline(test.db, test.program.id, number);
  if (baseline === undefined) throw new Error(`no baseline ${number}`);
  return readStoredDocument(baseline.document);
};

describe('limits in force', () => {
  it('are held against every condition they are about, with the very figures of the results', async () => {
    const { limits, conditions } = await documentOf(2);
    const ferry = conditions.find(({ code }) => code === 'ferry');
    const contract = limits?.find(({ kind }) => kind === 'contract');
    expect(contract).toMatchObject({
      quantity: 'mass',
      sense: 'at-most',
      value: 1400,
      unit: 'kg',
      condition: 'ferry',
    });
    expect(contract?.standings).toEqual([
      {
        condition: 'ferry',
        verdict: expect.any(String) as string,
        basic: ferry?.mass,
        margin: 1400 - (ferry?.mass ?? NaN),
        predicted: ferry?.predictedMass,
        predictedMargin: 1400 - (ferry?.predictedMass ?? NaN),
      },
    ]);
    const wing = limits?.find(({ group }) => group === 'Wing');
    // Invented rows of fillProgram: two pairs and a radar, 2 (120.3 + 60.7) + 31.9 kg, in both conditions.
    expect(wing?.standings.map(({ basic }) => basic?.toFixed(6))).toEqual(['393.900000', '393.900000']);
    expect(wing?.standings.map(({ verdict }) => verdict)).toEqual(['beyond', 'beyond']);
    expect(limits).toHaveLength(3);
  });

  it('are part of what was signed: those of later days change neither document nor page', async () => {
    const before = await documentOf(2);
    await state({ kind: 'allocation', group: 'Wing', value: 999 }, ids[1] ?? null);
    await removeLimit(test.db, { person: test.crew.chief, programId: test.program.id, id: ids[2] ?? '' });
    const after = await documentOf(2);
    expect(after).toEqual(before);
    const kept = keptStandings(after) ?? [];
    expect(kept.filter(({ limit }) => limit.group === 'Wing').map(({ limit }) => limit.value)).toEqual([
      390, 390,
    ]);
    const baseline = await findBaseline(test.db, test.program.id, 2);
    const submission = await findSubmission(test.db, test.program.id, baseline?.submission_id ?? '');
    if (submission === undefined) throw new Error('there is a submission');
    expect(standingsOf(submission.result)).toEqual(kept);
    expect((await verifyEverything(test.db)).breaches).toEqual([]);
  });

  it('leave a document of before there were any without that member, and it verifies as ever', async () => {
    const document = await documentOf(1);
    expect('limits' in document).toBe(false);
    expect(keptStandings(document)).toBeNull();
  });

  it('leave by the API in the units asked for, as its schema says', async () => {
    const document = await documentOf(2);
    const whole = { ...document, state: 'current', digest: 'sha256:0' };
    expect(baselineDocumentSchema.parse(whole).limits).toEqual(document.limits);
    const us = inUnits(document, 'us');
    const [mass, mac] = ['mass', 'percentMac'].map((name) =>
      us.limits?.find(({ quantity }) => quantity === name),
    );
    // 1 lb = 0.45359237 kg, exact (NIST SP 811, B.8).
    expect(mass?.unit).toBe('lb');
    expect(mass?.value).toBeCloseTo((mass?.group === 'Wing' ? 390 : 1400) / 0.45359237, 8);
    const stated = document.limits?.find(({ quantity }) => quantity === 'mass')?.standings[0];
    expect(mass?.standings[0]?.margin).toBeCloseTo((stated?.margin ?? NaN) / 0.45359237, 8);
    expect(mac?.unit).toBe('% MAC');
    expect(mac).toEqual(document.limits?.find(({ quantity }) => quantity === 'percentMac'));
  });
});

describe('a figure beyond a limit', () => {
  it('of a contract stops a submission until it is answered, of an allocation never', async () => {
    const { configuration } = await submitted(test, { code: 'answered', title: 'Answered' });
    await state({ condition: 'empty', value: 1000 }, ids[0] ?? null);
    const found = await findConfiguration(test.db, test.program.id, 'judged');
    if (found === undefined) throw new Error('there is a configuration');
    const { findings } = await evaluate(test.db, configuration);
    const limits = findings.filter(({ rule }) => rule.startsWith('beyond-'));
    expect(limits).toMatchObject([
      { rule: 'beyond-contract', severity: 'warning', where: { kind: 'condition', code: 'empty' } },
    ]);
    const submit = (answers: Record<string, string>) =>
      submitConfiguration(test.db, {
        person: test.crew.weights,
        program: test.program,
        configuration: found,
        version: found.version,
        title: 'Heavy',
        reason: 'for the test',
        answers,
      });
    const others = Object.fromEntries(
      findings.filter((one) => !limits.includes(one)).map((one) => [findingKey(one), 'Seen.']),
    );
    await expect(submit(others)).rejects.toMatchObject({
      code: 'invalid-input',
      errors: [{ pointer: '/answers/condition:empty:beyond-contract' }],
    });
    await submit({
      ...others,
      'condition:empty:beyond-contract': 'The customer knows; a change note is due.',
    });
  });

  it('is told again when a limit has changed since a roll-up', async () => {
    const { result } = await evaluate(
      test.db,
      (await findConfiguration(test.db, test.program.id, 'judged'))!,
    );
    const then = { version: 1, ...result };
    expect(changedSince(then, { ...then })).toEqual([]);
    const [first, ...rest] = result.limits ?? [];
    if (first === undefined) throw new Error('there is a limit');
    expect(changedSince(then, { ...then, limits: [...rest, first] })).toEqual([]);
    expect(changedSince(then, { ...then, limits: [{ ...first, value: 1 }, ...rest] })).toEqual([
      'The limits in force are others.',
    ]);
  });
});

describe('a group renamed between two baselines', () => {
  it('is one group in their comparison, by the name it had when the later one was submitted; signed ones keep theirs', async () => {
    const change = (...changes: Parameters<typeof changeGroups>[1]['changes'][number][]) =>
      changeGroups(test.db, { person: test.crew.weights, programId: test.program.id, changes });
    const blank = { to: null, code: null };
    await change({ kind: 'added', path: 'Wing', ...blank }, { kind: 'added', path: 'Body', ...blank });
    await change({ kind: 'moved', path: 'Wing', to: 'Mainplane', code: null });
    await state({ condition: 'ferry', value: 9000 }, ids[0] ?? null);
    const { number, submissionId } = await signed(test, { code: 'renamed', title: 'Under another name' });
    const later = await loadSigned(test.db, test.program.id, String(number));
    expect(later.submission.result.conditions[0]?.rollUp.groups.map(({ group }) => group)).toEqual([
      'Body',
      'Mainplane',
    ]);
    expect(later.changesOf('empty')).toEqual([]);
    const before = await loadSigned(test.db, test.program.id, String(number - 1));
    expect(before.submission.result.conditions[0]?.rollUp.groups.map(({ group }) => group)).toEqual([
      'Body',
      'Wing',
    ]);
    const reader = { userId: test.crew.chief.userId, role: 'chief' } as const;
    const review = await loadReview(test.db, { programId: test.program.id, submissionId, reader });
    expect(review.comparison.conditions.flatMap(({ groups }) => groups)).toEqual([]);
    expect((await verifyEverything(test.db)).breaches).toEqual([]);
  });
});
