import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { latestRollUp, rotorRevisionsOf } from '@/db/queries/configurations';
import { type RotorFile } from '@/lib/contracts/rotors';
import { applyMat } from '@/lib/numerics/mat3';
import { type Person } from '@/lib/server/actor';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { reachConfiguration } from '@/lib/server/configurations/reach-configuration';
import { rollUpConfiguration } from '@/lib/server/configurations/roll-up-configuration';
import { receiveRotorFile } from '@/lib/server/rotors/receive-rotor-file';
import { reviseRotors } from '@/lib/server/rotors/revise-rotors';
import { fromSi, rpm } from '@/lib/units/convert';
import { F16_ENGINE_MOMENTUM } from '@/tests/references/aircraft';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

let test: ProgramUnderTest;
beforeAll(async () => {
  test = await programUnderTest();
});
afterAll(() => test.close());

function upload(text: string, file: RotorFile, person: Person = test.crew.weights, length?: number) {
  const body = Buffer.from(text);
  const request = new Request('http://127.0.0.1/', {
    method: 'POST',
    headers: {
      'Content-Type': 'text/csv',
      'Content-Length': String(length ?? body.byteLength),
      'X-File-Name': 'rotors.csv',
    },
    body,
  });
  return receiveRotorFile(test.db, { person, programId: test.program.id, request, file });
}

const revisions = () => rotorRevisionsOf(test.db, test.program.id);

/*
 * B1, B2. The F-16 model of Stevens and Lewis (Aircraft Control and Simulation, after NASA TP-1538) has an engine angular momentum
 * of 160 slug.ft2/s along +x body, and its rotor terms give the airframe a moment [0, -r hx, +q hx].
 */
const ENGINE = 'rotor,polar_inertia,axis_yaw,axis_pitch,sense,shaft\nEngine,1,0,0,cw,core\n';
const POINT = `point,shaft,rpm\nmilitary,core,${rpm(F16_ENGINE_MOMENTUM)}\n`;

describe('rotating parts from a file', () => {
  it('become a revision, and operating points the next one, with who, when and why', async () => {
    const first = await upload(ENGINE, {
      content: 'rotors',
      inertia_unit: 'slug.ft2',
      base: 0,
      reason: 'engine model',
    });
    expect(first).toMatchObject({ status: 'revised', revision: 1, count: 1, unread: [] });
    const second = await upload(POINT, { content: 'points', base: 1, reason: 'one power setting' });
    expect(second).toMatchObject({ status: 'revised', revision: 2, count: 1 });
    const [newest, before] = await revisions();
    expect(newest).toMatchObject({
      number: 2,
      reason: 'one power setting',
      author: 'weights',
      file_name: 'rotors.csv',
    });
    expect(newest?.rotors).toEqual(before?.rotors);
  });

  it('give the F-16 engine momentum along +x with the published sign of its moments, through list, configuration and stored result', async () => {
    await reviseList(test, test.crew.weights, 'body', 'item,mass,x,y,z,ixx,iyy,izz\nA,1,6,0,1,1,1,1\n');
    const person = test.crew.weights;
    await createConfiguration(test.db, {
      person,
      programId: test.program.id,
      buildCode: 'design',
      code: 'f',
      title: 'F',
    });
    const configuration = await reachConfiguration(test.db, test.program.id, 'f');
    await rollUpConfiguration(test.db, { person, configuration });
    const stored = await latestRollUp(test.db, configuration.id);
    const point = stored?.result.operatingPoints[0];
    if (point === undefined) throw new Error('there is no operating point');
    const [hx, hy, hz] = point.momentum.total.map((part) => fromSi(part, 'slug.ft2/s'));
    expect(hx).toBeCloseTo(F16_ENGINE_MOMENTUM, 10);
    expect([hy, hz].map((part) => Math.abs(part ?? NaN))).toEqual([0, 0]);
    const [q, r] = [0.1, 0.2];
    const moment = applyMat(point.momentum.gyroMatrix, [0.3, q, r]);
    expect(moment[0]).toBeCloseTo(0, 12);
    expect(fromSi(moment[1], 'slug.ft2/s')).toBeCloseTo(-r * F16_ENGINE_MOMENTUM, 9);
    expect(fromSi(moment[2], 'slug.ft2/s')).toBeCloseTo(q * F16_ENGINE_MOMENTUM, 9);
  });

  it('are refused whole when something is wrong, with the problems of the file', async () => {
    const wrong = readFileSync('fixtures/rotors/invalid/wrong-rows.csv', 'utf8');
    const before = (await revisions()).length;
    const answer = await upload(wrong, {
      content: 'rotors',
      inertia_unit: 'kg.m2',
      base: before,
      reason: 'wrong',
    });
    if (answer.status !== 'problems') throw new Error('a wrong file was accepted');
    expect(answer.total).toBeGreaterThanOrEqual(answer.problems.length);
    expect(answer.problems.length).toBeGreaterThan(5);
    expect(await revisions()).toHaveLength(before);
  });

  it('are refused when the body is not as long as declared', async () => {
    const before = (await revisions()).length;
    await expect(
      upload(
        ENGINE,
        { content: 'rotors', inertia_unit: 'kg.m2', base: before, reason: 'short' },
        undefined,
        500,
      ),
    ).rejects.toMatchObject({ code: 'invalid-request' });
    expect(await revisions()).toHaveLength(before);
  });
});

describe('two people at once', () => {
  it('the second is told who was first, and nothing of either is lost or mixed', async () => {
    const { db, program, crew } = test;
    const [seen] = await revisions();
    if (seen === undefined) throw new Error('there is a revision by now');
    const point = (code: string) => ({
      code,
      title: code,
      speeds: [{ shaft: 'core', speed: 100, sigma: null }],
    });
    const revise = (person: Person, code: string) =>
      reviseRotors(db, {
        person,
        programId: program.id,
        base: seen.number,
        reason: code,
        points: [...seen.points, point(code)],
      });
    const outcomes = await Promise.allSettled([
      revise(crew.weights, 'mine'),
      revise(crew.weights2, 'theirs'),
    ]);
    const won = outcomes.filter(({ status }) => status === 'fulfilled');
    const [lost] = outcomes.filter((outcome) => outcome.status === 'rejected');
    expect(won).toHaveLength(1);
    expect(lost?.reason).toMatchObject({ code: 'conflict' });
    const [newest, ...rest] = await revisions();
    expect(newest?.number).toBe(seen.number + 1);
    expect(rest[0]?.points).toEqual(seen.points);
    expect(newest?.points).toHaveLength(seen.points.length + 1);
    expect(String(lost?.reason)).toContain(newest?.author);
  });
});

describe('a revision with something missing', () => {
  it('is kept with its findings: a shaft without a speed is a blocker', async () => {
    const { db, program, crew } = test;
    const [seen] = await revisions();
    await reviseRotors(db, {
      person: crew.weights,
      programId: program.id,
      base: seen?.number ?? 0,
      reason: 'a point without speeds',
      points: [{ code: 'blank', title: 'Blank', speeds: [] }],
    });
    const [newest] = await revisions();
    expect(newest?.findings.map(({ rule, severity }) => [rule, severity])).toEqual([
      ['shaft-without-speed', 'blocker'],
      ['rotor-without-component', 'note'],
    ]);
  });
});
