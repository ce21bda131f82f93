import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import pg from 'pg';
import { conditionsOf, pinnedRevisions, subtotalsOf } from '@/db/queries/configurations';
import { findList, findRevision } from '@/db/queries/lists';
import { programFrames } from '@/db/queries/program-frames';
import { referencePointsOf } from '@/db/queries/settings';
import { changedPlace } from '@/lib/frames/issue-change';
import { NO_POSE, type Pose } from '@/lib/frames/pose';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { verifyEverything } from '@/lib/server/baselines/verify';
import { chooseFrame } from '@/lib/server/configurations/choose-frame';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { pinRevisions } from '@/lib/server/configurations/pin-revisions';
import { reachConfiguration } from '@/lib/server/configurations/reach-configuration';
import { evaluate } from '@/lib/server/configurations/roll-up-configuration';
import { saveCondition } from '@/lib/server/configurations/save-condition';
import { carryList, carryReason } from '@/lib/server/lists/carry-list';
import { editRows } from '@/lib/server/lists/edit-rows';
import { saveList } from '@/lib/server/lists/save-list';
import { stateFormerFrame } from '@/lib/server/programs/frame-step';
import { issueFrame } from '@/lib/server/programs/issue-frame';
import { reviseRotors } from '@/lib/server/rotors/revise-rotors';
import { configurationSource } from '@/lib/server/three-views/sources';
import { loadPicture } from '@/lib/server/three-views/load-picture';
import { radians } from '@/lib/units/convert';
import { properties } from '@/tests/support/mass';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';
import { POINTS, ROTORS } from '@/tests/support/signed';

/* Invented rows with pairs, turns and uncertainties; the second list is in millimetres and in axes and a frame of its own. */
const WING = `item,group,mass,x,y,z,ixx,iyy,izz,ixy,yaw,symmetry,maturity,mass_sigma,x_sigma,ixx_sigma
spar,Wing/Spars,120,6.4,2.5,1.2,90,8,95,4,12,pair,C,1.5,0.01,2
rib,Wing/Ribs,30,6.8,3.0,1.2,,,,,,pair,E,0.4,0.02,
radar,Wing,31.9,6.1,-4.4,1.1,0.7,0.6,0.8,0.1,30,,C,0.3,0.01,0.1
`;
const BODY = `item,group,mass,x,y,z,ixx,iyy,izz,ixz,maturity
shell,Body,901.7,120,20,-430,503,4207,4311,-123,C
`;
const IN_MM = {
  length_unit: 'mm',
  axes: 'forward,right,down',
  frame: { origin: { x: 6500, y: 0, z: 1000 }, yaw: 1, pitch: -2, roll: 0.5 },
} as const;

const FIRST: AirframeGeometry = {
  axes: ['aft', 'right', 'up'],
  lateralPlane: 0,
  incidence: 0,
  reference: [6.5, 0, 1],
  lemac: [6, 0, 1],
  mac: 2,
  span: 18,
  length: 15,
};

/** What each next issue does, and where the former frame lies in it. */
const STEPS: readonly { title: string; geometry: AirframeGeometry; former: Pose }[] = [
  {
    title: 'Datum moved 2.5 m ahead',
    geometry: { ...FIRST, reference: [9, 0, 1], lemac: [8.5, 0, 1] },
    former: { ...NO_POSE, origin: [2.5, 0, 0] },
  },
  {
    title: 'Stations renumbered from 100 m, waterlines from one below',
    geometry: { ...FIRST, reference: [109, 0, 4], lemac: [108.5, 0, 4] },
    former: { ...NO_POSE, origin: [100, 0, 3] },
  },
  {
    title: 'Butt lines to the left, so left-handed',
    geometry: { ...FIRST, axes: ['aft', 'left', 'up'], reference: [109, 0, 4], lemac: [108.5, 0, 4] },
    former: NO_POSE,
  },
  {
    title: 'Reference line laid anew, stations forward',
    geometry: {
      ...FIRST,
      axes: ['forward', 'right', 'down'],
      incidence: radians(2),
      reference: [-109, 0, -7],
      lemac: [-108.5, 0, -7],
    },
    // By hand: right-handed axes forward, right, down; pitched by +2 degrees about +y, to the right, the old forward points up.
    former: { ...NO_POSE, pitch: radians(2), origin: [0.3, 0, 0.1] },
  },
];

let test: ProgramUnderTest;
let pool: pg.Pool;

const author = () => test.crew.weights;
const reach = (code: string) => reachConfiguration(test.db, test.program.id, code);
const frames = () => programFrames(test.db, test.program.id);

beforeAll(async () => {
  test = await programUnderTest();
  pool = new pg.Pool({ connectionString: test.appUrl, max: 4 });
  const { db, program, crew } = test;
  await reviseList(test, crew.weights, 'wing', WING, { uncertainty: '1sigma' });
  await reviseList(test, crew.weights, 'body', BODY, IN_MM);
  await reviseRotors(db, {
    person: crew.weights,
    programId: program.id,
    reason: 'for the test',
    base: 0,
    rotors: [
      ...ROTORS,
      {
        ...(ROTORS[0] ?? fail()),
        rotor: 'fan',
        shaft: 'right engine',
        axis: { kind: 'arrow', x: -2, y: 0.3, z: 0.4, hand: 'lh' },
      },
    ],
    points: POINTS,
  });
  await db
    .insertInto('reference_points')
    .values({
      frame_issue_id: test.frameIssueId,
      code: 'MRC',
      title: 'Moment reference',
      place: [6.5, 0.25, 1],
      created_by: crew.chief.userId,
    })
    .execute();
  await createConfiguration(db, {
    person: author(),
    programId: program.id,
    buildCode: 'design',
    code: 'first',
    title: 'First',
  });
  const first = await reach('first');
  await saveCondition(db, {
    person: author(),
    configuration: first,
    version: first.version,
    condition: {
      code: 'ferry',
      title: 'Ferry',
      categories: ['empty'],
      items: [{ name: 'spare engine', category: 'payload', mass: 211.3, place: [5.2, -0.31, 1.1] }],
    },
  });
  for (const [at, { title, geometry, former }] of STEPS.entries())
    await issueFrame(db, {
      person: crew.chief,
      programId: program.id,
      base: at + 1,
      title,
      geometry,
      former,
      validFrom: '2026-02-01',
      reason: 'for the test',
      carryPoints: true,
    });
});
afterAll(async () => {
  await pool.end();
  await test.close();
});

function fail(): never {
  throw new Error('there are rotors');
}

/** Mass, CG in the first issue's frame, tensor about the CG and angular momentum in body axes, predicted mass and σ, per condition. */
async function summary(code: string) {
  const configuration = await reach(code);
  const { result } = await evaluate(test.db, configuration);
  const back = (await frames()).conversion(configuration.frame_issue_id, test.frameIssueId);
  return {
    conditions: result.conditions.map(({ rollUp, uncertainty }) => {
      const { cg, inertia, percentMac } = properties(rollUp.basic);
      const sigma = uncertainty.basic.properties;
      if (sigma === null) throw new Error('there is mass');
      const { inertia: s, cgCovariance: c } = sigma;
      return {
        mass: [rollUp.basic.mass, rollUp.predicted.mass, uncertainty.basic.mass],
        cg: back.place(cg),
        percentMac,
        inertia: Object.values(inertia),
        sigma: Object.values(s),
        spread: [c.xx + c.yy + c.zz],
      };
    }),
    momentum: result.operatingPoints.map(({ momentum }) => momentum.total),
  };
}

type Summary = Awaited<ReturnType<typeof summary>>;

function expectSame(a: Summary, b: Summary, { chord }: { readonly chord: boolean }) {
  const close = (p: readonly number[], q: readonly number[], share: number) => {
    const size = Math.max(...q.map(Math.abs));
    p.forEach((value, i) => expect(Math.abs(value - (q[i] ?? NaN))).toBeLessThanOrEqual(share * size));
  };
  expect(a.conditions).toHaveLength(b.conditions.length);
  a.conditions.forEach((one, i) => {
    const other = b.conditions[i] ?? fail();
    close(one.mass, other.mass, 1e-14);
    close(one.cg, other.cg, 1e-13);
    close(one.inertia, other.inertia, 1e-12);
    close(one.sigma, other.sigma, 1e-9);
    close(one.spread, other.spread, 1e-9);
    if (chord) expect(one.percentMac).toBeCloseTo(other.percentMac ?? NaN, 9);
  });
  a.momentum.forEach((total, i) => close(total, b.momentum[i] ?? fail(), 1e-13));
}

const TURNED = 5;

describe('a configuration put into another frame issue', () => {
  it.each([2, 3, 4, 5])(
    'says the same of the same aircraft in issue %i, rotors and items on board with it',
    async (number) => {
      const before = await summary('first');
      await createConfiguration(test.db, {
        person: author(),
        programId: test.program.id,
        buildCode: 'design',
        code: `copy-${number}`,
        title: 'Copy',
        frameIssue: 1,
      });
      const made = await reach(`copy-${number}`);
      const [, ferry] = await conditionsOf(test.db, (await reach('first')).id);
      await saveCondition(test.db, {
        person: author(),
        configuration: made,
        version: made.version,
        condition: {
          code: 'ferry',
          title: 'Ferry',
          categories: ['empty'],
          items: (ferry?.items ?? []).map(({ name, category, mass, place: [x = NaN, y = NaN, z = NaN] }) => ({
            name,
            category,
            mass,
            place: [x, y, z],
          })),
        },
      });
      const seen = await reach(`copy-${number}`);
      const version = await chooseFrame(test.db, {
        person: author(),
        configuration: seen,
        version: seen.version,
        frameIssue: number,
      });
      expect(version).toBe(seen.version + 1);
      const now = await reach(`copy-${number}`);
      expect(now.frame_issue_number).toBe(number);
      expectSame(await summary(`copy-${number}`), before, { chord: number !== TURNED });
      // And back again, from the newer to the older.
      await chooseFrame(test.db, {
        person: author(),
        configuration: now,
        version: now.version,
        frameIssue: 1,
      });
      expectSame(await summary(`copy-${number}`), before, { chord: true });
    },
  );

  it('is refused where it has changed meanwhile, and for an issue that there is not', async () => {
    const seen = await reach('copy-2');
    const change = { person: author(), configuration: seen, version: seen.version - 1, frameIssue: 2 };
    await expect(chooseFrame(test.db, change)).rejects.toMatchObject({ code: 'conflict' });
    await expect(
      chooseFrame(test.db, { ...change, version: seen.version, frameIssue: 9 }),
    ).rejects.toMatchObject({ code: 'invalid-input' });
    expect((await reach('copy-2')).version).toBe(seen.version);
  });

  it('stands in the trail', async () => {
    const [event] = await test.db
      .selectFrom('audit_events')
      .select('detail')
      .where('kind', '=', 'configuration.changed')
      .where('subject', '=', 'copy-2')
      .orderBy('number', 'desc')
      .limit(1)
      .execute();
    expect(event?.detail).toMatchObject({ what: 'frame issue 2 to 1' });
  });
});

describe('a new configuration', () => {
  it('stands in the issue in force and takes the lists of every issue, converted', async () => {
    await createConfiguration(test.db, {
      person: author(),
      programId: test.program.id,
      buildCode: 'design',
      code: 'newest',
      title: 'Newest',
    });
    const made = await reach('newest');
    expect(made.frame_issue_number).toBe(5);
    const pins = await pinnedRevisions(test.db, made.id);
    expect(pins.map(({ list_code }) => list_code)).toEqual(['body', 'wing']);
    expect(new Set(pins.map(({ frame_issue_id }) => frame_issue_id))).toEqual(new Set([test.frameIssueId]));
    const [empty] = (await summary('newest')).conditions;
    const [before] = (await summary('first')).conditions;
    empty?.cg.forEach((part, k) => expect(part).toBeCloseTo(before?.cg[k] ?? NaN, 11));
  });

  it('draws its rows, and the images of its pairs, where they lie in the issue of the configuration', async () => {
    const [old, now] = await Promise.all(
      ['first', 'newest'].map((code) => configurationSource(test.db, test.program.id, code)),
    );
    if (old === undefined || now === undefined) fail();
    const filter = { list: null, group: '', category: null };
    const pictures = await Promise.all(
      [old, now].map((source) => loadPicture(test.db, source, source.conditions[0] ?? fail(), filter)),
    );
    const { change } = (await frames()).conversion(test.frameIssueId, (await reach('newest')).frame_issue_id);
    const [before, after] = pictures.map(({ rows }) => rows);
    const spar = before?.find(({ item }) => item === 'spar');
    expect(spar?.places).toHaveLength(2);
    for (const row of before ?? []) {
      const places = after?.find(({ item }) => item === row.item)?.places ?? [];
      row.places
        .map((one) => changedPlace(change, one))
        .forEach((one, i) => one.forEach((part, k) => expect(places[i]?.[k]).toBeCloseTo(part, 11)));
    }
  });
});

describe('reference points', () => {
  it('taken over are the same points of the aircraft', async () => {
    const { issues } = await frames();
    const all = await Promise.all(
      [2, 3, 4, 5].map(async (number) =>
        referencePointsOf(test.db, issues.find((issue) => issue.number === number)?.id ?? ''),
      ),
    );
    const places = all.map(([point]) => point?.place ?? []);
    // By hand: 2.5 m further aft, then 100 m aft and 3 m up, then butt lines to the left.
    expect(places.slice(0, 3)).toEqual([
      [9, 0.25, 1],
      [109, 0.25, 4],
      [109, -0.25, 4],
    ]);
    const [c, s] = [Math.cos(radians(2)), Math.sin(radians(2))];
    // Forward, right, down: (-109, 0.25, -4), pitched by 2 degrees, moved by (0.3, 0, 0.1).
    [-109 * c - 4 * s + 0.3, 0.25, 109 * s - 4 * c + 0.1].forEach((part, k) =>
      expect(places[3]?.[k]).toBeCloseTo(part, 11),
    );
  });
});

describe('a list', () => {
  const carry = async (code: string, frameIssue: number, baseRevision?: number) => {
    const list = await findList(test.db, test.program.id, code);
    if (list === undefined) fail();
    return carryList(
      { pool, db: test.db },
      {
        person: author(),
        list,
        baseRevision: baseRevision ?? list.last_revision,
        frameIssue,
        reason: carryReason(1, frameIssue),
      },
    );
  };

  it.each(['wing', 'body'])(
    'carried to a newer issue keeps its rows and all that rolls up from it: %s',
    async (code) => {
      const before = await summary('first');
      const rowsOf = async (revision: string) =>
        test.db
          .selectFrom('mass_rows')
          .select(['row_no', 'position'])
          .where('revision_id', '=', revision)
          .orderBy('position')
          .execute();
      const list = await findList(test.db, test.program.id, code);
      if (list === undefined) fail();
      const base = await findRevision(test.db, list.id, 1);
      const number = await carry(code, 3);
      expect(number).toBe(2);
      const made = await findRevision(test.db, list.id, 2);
      if (base === undefined || made === undefined) fail();
      expect(await rowsOf(made.id)).toEqual(await rowsOf(base.id));
      expect([made.rows, made.pieces, made.reason]).toEqual([base.rows, base.pieces, carryReason(1, 3)]);
      const now = await findList(test.db, test.program.id, code);
      const issue = (await frames()).issues.find((one) => one.number === 3);
      expect([made.frame_issue_id, now?.frame_issue_id]).toEqual([issue?.id, issue?.id]);
      // By hand: the datum is 102.5 m ahead and 3 m below.
      const origin = base.declarations.pose.origin;
      const moved = [origin[0] + 102.5, origin[1], origin[2] + 3];
      expect(made.declarations.pose.origin).toEqual(moved.map((part) => expect.closeTo(part, 12)));
      expect(now?.declarations.pose).toEqual(made.declarations.pose);

      // Converted subtotals of the old revision against those that were summed in the new issue.
      const [converted, direct] = await Promise.all(
        [base, made].map(({ id }) => subtotalsOf(test.db, [id], issue?.id ?? '')),
      );
      converted?.forEach((part, i) => {
        const other = direct?.[i] ?? fail();
        expect(part.basic.mass).toBe(other.basic.mass);
        part.basic.first.forEach((one, k) => expect(one).toBeCloseTo(other.basic.first[k] ?? NaN, 8));
        const { covariance } = other.uncertainty.basic;
        const size = Math.max(...covariance.map(Math.abs));
        part.uncertainty.basic.covariance.forEach((one, k) =>
          expect(Math.abs(one - (covariance[k] ?? NaN))).toBeLessThanOrEqual(1e-11 * size),
        );
      });
      const first = await reach('first');
      const pins = await pinnedRevisions(test.db, first.id);
      await pinRevisions(test.db, {
        person: author(),
        configuration: first,
        version: first.version,
        revisions: {
          ...Object.fromEntries(pins.map((pin) => [pin.list_code, pin.number])),
          [code]: 2,
        },
        rotors: 1,
      });
      expectSame(await summary('first'), before, { chord: true });
    },
  );

  it('carried stands in the trail, with what and where', async () => {
    const events = await test.db
      .selectFrom('audit_events')
      .select('detail')
      .where('kind', '=', 'list.carried')
      .execute();
    expect(events.map(({ detail }) => detail)).toEqual([
      { list: 'wing', from: 1, to: 3, revision: 2, reason: carryReason(1, 3) },
      { list: 'body', from: 1, to: 3, revision: 2, reason: carryReason(1, 3) },
    ]);
  });

  it('is carried by no one who did not see how it stands, nor where it is already', async () => {
    await expect(carry('wing', 4, 1)).rejects.toMatchObject({ code: 'conflict' });
    await expect(carry('wing', 3)).rejects.toMatchObject({ code: 'conflict' });
  });

  it('edited from a revision of an older issue stays in that issue', async () => {
    const list = await findList(test.db, test.program.id, 'wing');
    if (list === undefined) fail();
    const saved = await editRows(
      { pool, db: test.db },
      {
        person: author(),
        list,
        baseRevision: 2,
        reason: 'heavier',
        edits: [{ kind: 'change', item: 'radar', fields: { mass: '33' } }],
      },
    );
    expect(saved).toEqual({ status: 'saved', revision: 3 });
    const revision = await findRevision(test.db, list.id, 3);
    expect((await frames()).issue(revision?.frame_issue_id ?? '').number).toBe(3);
  });

  it('declared to be stated in a newer issue is read in it from the next file on', async () => {
    const list = await findList(test.db, test.program.id, 'body');
    if (list === undefined) fail();
    const input = { person: author(), programId: test.program.id, code: 'body', title: 'body' };
    await saveList(test.db, { ...input, declarations: list.declarations, frameIssue: 5 });
    const now = await findList(test.db, test.program.id, 'body');
    expect((await frames()).issue(now?.frame_issue_id ?? '').number).toBe(5);
    expect(now?.declarations).toEqual(list.declarations);
    await expect(
      saveList(test.db, { ...input, declarations: list.declarations, frameIssue: 9 }),
    ).rejects.toMatchObject({ code: 'invalid-input' });
    const kept = await findRevision(test.db, list.id, 2);
    expect((await frames()).issue(kept?.frame_issue_id ?? '').number).toBe(3);
  });

  it('of pairs is not carried to an issue with another plane of symmetry, and its images stay where they were', async () => {
    await issueFrame(test.db, {
      person: test.crew.chief,
      programId: test.program.id,
      base: 5,
      title: 'Plane of symmetry moved',
      geometry: { ...(STEPS[3]?.geometry ?? fail()), lateralPlane: 0.02 },
      former: NO_POSE,
      validFrom: '2026-03-01',
      reason: 'for the test',
      carryPoints: false,
    });
    await expect(carry('wing', 6)).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('mirror images') as string,
    });
    const before = await summary('first');
    const first = await reach('first');
    await chooseFrame(test.db, {
      person: author(),
      configuration: first,
      version: first.version,
      frameIssue: 6,
    });
    expectSame(await summary('first'), before, { chord: false });
  });
});

describe('an issue that does not say how the one before lies in it', () => {
  it('is crossed by nothing, until a chief engineer says so, once', async () => {
    const other = await programUnderTest('old-hopper');
    try {
      const { db, program, crew } = other;
      await reviseList(other, crew.weights, 'wing', WING);
      // As it was made before issues were asked for it.
      await db
        .insertInto('frame_issues')
        .values({
          id: 'second',
          program_id: program.id,
          number: 2,
          title: 'Second',
          axis_x: 'aft',
          axis_y: 'right',
          axis_z: 'up',
          lemac: [8.5, 0, 1],
          mac: 2,
          span: 18,
          length: 15,
          reference: [9, 0, 1],
          valid_from: '2026-02-01',
          reason: 'datum moved',
          created_by: crew.chief.userId,
          lateral_plane: 0,
          incidence: 0,
        })
        .execute();
      const person = crew.weights;
      const make = (code: string, frameIssue: number) =>
        createConfiguration(db, {
          person,
          programId: program.id,
          buildCode: 'design',
          code,
          title: code,
          frameIssue,
        });
      await make('two', 2);
      const two = await reachConfiguration(db, program.id, 'two');
      expect(await pinnedRevisions(db, two.id)).toEqual([]);
      const pin = () =>
        pinRevisions(db, {
          person,
          configuration: two,
          version: two.version,
          revisions: { wing: 1 },
          rotors: null,
        });
      await expect(pin()).rejects.toMatchObject({
        code: 'invalid-input',
        message: expect.stringContaining('issue 2 does not say') as string,
      });
      await make('one', 1);
      const one = await reachConfiguration(db, program.id, 'one');
      await expect(
        chooseFrame(db, { person, configuration: one, version: one.version, frameIssue: 2 }),
      ).rejects.toMatchObject({ code: 'invalid-input' });
      const former = { ...NO_POSE, origin: [2.5, 0, 0] as const };
      const said = { person: crew.chief, programId: program.id, former };
      await stateFormerFrame(db, { ...said, number: 2 });
      await expect(stateFormerFrame(db, { ...said, number: 2 })).rejects.toMatchObject({ code: 'conflict' });
      await expect(stateFormerFrame(db, { ...said, number: 1 })).rejects.toMatchObject({ code: 'not-found' });
      await pin();
      const { result } = await evaluate(db, await reachConfiguration(db, program.id, 'two'));
      const same = await evaluate(db, one);
      const [x, ...rest] = properties(result.conditions[0]?.rollUp.basic ?? fail()).cg;
      const [station, ...others] = properties(same.result.conditions[0]?.rollUp.basic ?? fail()).cg;
      expect(x).toBeCloseTo(station + 2.5, 12);
      expect(rest).toEqual(others.map((part) => expect.closeTo(part, 12)));
      expect((await verifyEverything(db)).breaches).toEqual([]);
      await expect(
        db
          .updateTable('frame_steps')
          .set({ origin: [0, 0, 0] })
          .execute(),
      ).rejects.toMatchObject({
        message: expect.stringContaining('permission denied') as string,
      });
    } finally {
      await other.close();
    }
  });
});
