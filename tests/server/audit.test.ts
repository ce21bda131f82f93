import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  type Kysely,
  type KyselyPlugin,
  sql,
  type PluginTransformQueryArgs,
  type RootOperationNode,
} from 'kysely';
import { findConfiguration } from '@/db/queries/configurations';
import { type Database } from '@/db/schema/database';
import { returnSubmission } from '@/lib/server/baselines/return-submission';
import { signSubmission } from '@/lib/server/baselines/sign-submission';
import { submitConfiguration } from '@/lib/server/baselines/submit-configuration';
import { withdrawBaseline } from '@/lib/server/baselines/withdraw-baseline';
import { NO_POSE } from '@/lib/frames/pose';
import { chooseFrame } from '@/lib/server/configurations/choose-frame';
import { limitsOf } from '@/db/queries/settings';
import { changeGroups } from '@/lib/server/programs/change-groups';
import { removeAllowance, setAllowance } from '@/lib/server/programs/set-allowance';
import { removeLimit, stateLimit } from '@/lib/server/programs/set-limit';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { pinRevisions } from '@/lib/server/configurations/pin-revisions';
import { rollUpConfiguration } from '@/lib/server/configurations/roll-up-configuration';
import { removeCondition, saveCondition } from '@/lib/server/configurations/save-condition';
import { type Mapping } from '@/lib/ingest/mapping/mapping';
import { importMapped } from '@/lib/server/lists/mapping/import-mapped';
import { dropUpload, keepUpload } from '@/lib/server/lists/mapping/keep-upload';
import { saveList } from '@/lib/server/lists/save-list';
import { issueFrame } from '@/lib/server/programs/issue-frame';
import { reviseRotors } from '@/lib/server/rotors/revise-rotors';
import { type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

class Injected extends Error {}

/** Lets the first `writes` writing statements pass and fails the next one after it: what has been written must go again. */
class FailAfter implements KyselyPlugin {
  #seen = 0;
  constructor(private readonly writes: number) {}

  get reached(): boolean {
    return this.#seen > this.writes;
  }

  transformQuery({ node }: PluginTransformQueryArgs): RootOperationNode {
    const writing = ['InsertQueryNode', 'UpdateQueryNode', 'DeleteQueryNode'].includes(node.kind);
    if (writing || isEnqueue(node)) this.#seen += 1;
    if (this.reached) throw new Injected('after a write');
    return node;
  }

  transformResult(args: Parameters<KyselyPlugin['transformResult']>[0]) {
    return Promise.resolve(args.result);
  }
}

function isEnqueue(node: RootOperationNode): boolean {
  return node.kind === 'RawNode' && node.sqlFragments.join('').includes('add_job');
}

let test: ProgramUnderTest;
let submissionId: string;

beforeAll(async () => {
  test = await programUnderTest();
  await reviseList(
    test,
    test.crew.weights,
    'all',
    'item,mass,x,y,z,ixx,iyy,izz\na,900,6.5,0,1,500,4000,4200\n',
  );
  for (const code of ['one', 'two', 'three']) await create(test.db, code);
  submissionId = await submit(test.db, 'one');
  await signSubmission(test.db, { person: test.crew.chief, program: test.program, submissionId });
  submissionId = await submit(test.db, 'two');
});

afterAll(() => test.close());

type Db = Kysely<Database>;

const create = (db: Db, code: string) =>
  createConfiguration(db, {
    person: test.crew.weights,
    programId: test.program.id,
    buildCode: 'design',
    code,
    title: code,
  });

async function configuration(code: string) {
  const found = await findConfiguration(test.db, test.program.id, code);
  if (found === undefined) throw new Error(`no configuration ${code}`);
  return found;
}

async function submit(db: Db, code: string): Promise<string> {
  const found = await configuration(code);
  return submitConfiguration(db, {
    person: test.crew.weights,
    program: test.program,
    configuration: found,
    version: found.version,
    title: code,
    reason: 'for the test',
    answers: {},
  });
}

const change = async (code: string) => {
  const found = await configuration(code);
  return { person: test.crew.weights, configuration: found, version: found.version };
};

const MAPPING: Mapping = {
  version: 1,
  delimiter: ',',
  sheet: null,
  header: { first: 1, last: 1 },
  columns: (['item', 'mass', 'x', 'y', 'z'] as const).map((column) => ({
    heading: column,
    to: { use: 'column', column, unit: null },
  })),
  numbers: { decimal: '.', thousands: '' },
  per: 'piece',
  leaveOut: { totals: true, texts: true, headings: true },
};

async function sentFile() {
  const { id, code, program_id } = await test.db
    .selectFrom('lists')
    .selectAll()
    .where('code', '=', 'all')
    .executeTakeFirstOrThrow();
  return {
    person: test.crew.weights,
    list: { id, code, programId: program_id },
    file: { sha256: 'b'.repeat(64), bytes: 1, name: 'supplier.csv', lines: 2 },
  };
}

const newestUpload = () =>
  test.db.selectFrom('pending_uploads').selectAll().orderBy('created_at', 'desc').executeTakeFirstOrThrow();

/** Each step of the product that writes, run to its end on a database that fails after some write. */
const STEPS: Readonly<Record<string, (db: Db) => Promise<unknown>>> = {
  'create a configuration': (db) => create(db, 'four'),
  'pin revisions': async (db) =>
    pinRevisions(db, { ...(await change('three')), revisions: { all: 1 }, rotors: null }),
  'save a condition': async (db) =>
    saveCondition(db, {
      ...(await change('three')),
      condition: {
        code: 'crew',
        title: 'Crew',
        categories: ['empty'],
        items: [{ name: 'pilot', category: 'operating', mass: 90, place: [4, 0, 1] }],
      },
    }),
  'remove a condition': async (db) => removeCondition(db, { ...(await change('three')), code: 'crew' }),
  'roll up': async (db) =>
    rollUpConfiguration(db, { person: test.crew.weights, configuration: await configuration('three') }),
  'make a list': async (db) =>
    saveList(db, {
      person: test.crew.weights,
      programId: test.program.id,
      code: 'new-list',
      title: 'New list',
      declarations: (
        await test.db
          .selectFrom('lists')
          .select('declarations')
          .where('code', '=', 'all')
          .executeTakeFirstOrThrow()
      ).declarations,
    }),
  'declare a list anew': async (db) => {
    const list = await test.db
      .selectFrom('lists')
      .select(['declarations'])
      .where('code', '=', 'all')
      .executeTakeFirstOrThrow();
    return saveList(db, {
      person: test.crew.weights,
      programId: test.program.id,
      code: 'all',
      title: 'Another title',
      declarations: list.declarations,
    });
  },
  'keep a file for a mapping': async (db) => keepUpload(db, { ...(await sentFile()), reason: 'test' }),
  'drop it': async (db) => dropUpload(db, { ...(await sentFile()), upload: await newestUpload() }),
  'keep another': async (db) => keepUpload(db, { ...(await sentFile()), reason: 'test' }),
  'import it by a mapping': async (db) =>
    importMapped(db, {
      ...(await sentFile()),
      upload: await newestUpload(),
      mapping: MAPPING,
      acceptTotals: false,
    }),
  'revise the rotating parts': (db) =>
    reviseRotors(db, {
      person: test.crew.weights,
      programId: test.program.id,
      reason: 'test',
      base: 0,
      rotors: [],
      points: [],
      file: { sha256: 'a'.repeat(64), bytes: 1, name: 'rotors.csv' },
    }),
  'issue a frame': (db) =>
    issueFrame(db, {
      person: test.crew.chief,
      programId: test.program.id,
      base: 1,
      title: 'Second',
      geometry: {
        axes: ['aft', 'right', 'up'],
        lateralPlane: 0,
        incidence: 0,
        reference: [9, 0, 1],
        lemac: [8.5, 0, 1],
        mac: 2,
        span: 18,
        length: 15,
      },
      former: { ...NO_POSE, origin: [2.5, 0, 0] },
      validFrom: '2026-02-01',
      reason: 'datum moved',
      carryPoints: true,
    }),
  'put a configuration into another frame issue': async (db) =>
    chooseFrame(db, { ...(await change('three')), frameIssue: 2 }),
  'state a limit': (db) =>
    stateLimit(db, {
      person: test.crew.chief,
      programId: test.program.id,
      id: null,
      limit: {
        kind: 'target',
        quantity: 'mass',
        sense: 'at-most',
        value: 9000,
        group: '',
        condition: null,
        source: 'a plan',
        sourceDate: '2026-01-05',
        from: '2026-01-05',
        until: null,
      },
    }),
  'remove a limit': async (db) => {
    const [limit] = await limitsOf(test.db, test.program.id);
    return removeLimit(db, { person: test.crew.chief, programId: test.program.id, id: limit?.id ?? '' });
  },
  'set an allowance': (db) =>
    setAllowance(db, {
      person: test.crew.chief,
      programId: test.program.id,
      group: 'Wing',
      maturity: 'E',
      fraction: 0.1,
      source: 'a plan',
    }),
  'remove an allowance': (db) =>
    removeAllowance(db, {
      person: test.crew.chief,
      programId: test.program.id,
      group: 'Wing',
      maturity: 'E',
    }),
  'change the group breakdown': (db) =>
    changeGroups(db, {
      person: test.crew.weights,
      programId: test.program.id,
      changes: [
        { kind: 'added', path: 'Wing', to: null, code: '10' },
        { kind: 'added', path: 'Ungrouped', to: null, code: null },
        { kind: 'moved', path: 'Wing', to: 'Mainplane', code: null },
      ],
    }),
  submit: (db) => submit(db, 'three'),
  sign: (db) => signSubmission(db, { person: test.crew.chief, program: test.program, submissionId }),
  return: (db) =>
    returnSubmission(db, { person: test.crew.chief, program: test.program, submissionId, reason: 'not yet' }),
  withdraw: (db) =>
    withdrawBaseline(db, { person: test.crew.chief, program: test.program, number: 1, reason: 'wrong' }),
};

/** Everything that the steps write, as text: equal means nothing remained. */
async function everything(): Promise<string> {
  const tables = [
    'audit_events',
    'audit_heads',
    'baselines',
    'condition_items',
    'conditions',
    'configuration_lists',
    'configurations',
    'decisions',
    'frame_issues',
    'frame_steps',
    'group_changes',
    'growth_allowances',
    'limits',
    'import_mappings',
    'imports',
    'list_mappings',
    'lists',
    'pending_uploads',
    'reference_points',
    'roll_ups',
    'rotor_revisions',
    'stored_files',
    'submission_revisions',
    'submissions',
    'supersessions',
    'withdrawals',
  ] as const;
  const rows = await Promise.all(tables.map((table) => test.db.selectFrom(table).selectAll().execute()));
  const jobs = await sql`select count(*) as count from graphile_worker.jobs`.execute(test.db);
  return JSON.stringify([rows.map((each) => each.map((row) => JSON.stringify(row)).sort()), jobs.rows]);
}

describe.each(Object.keys(STEPS))('to %s', (name) => {
  it('leaves neither change nor audit row when it fails after any of its writes', async () => {
    const step = STEPS[name];
    if (step === undefined) throw new Error(name);
    let failures = 0;
    for (let writes = 0; ; writes += 1) {
      const plugin = new FailAfter(writes);
      const before = await everything();
      const attempt = step(test.db.withPlugin(plugin));
      const failed = await attempt.then(
        () => false,
        (error: unknown) => {
          if (error instanceof Injected) return true;
          throw error;
        },
      );
      if (!failed) break;
      failures += 1;
      expect(await everything()).toBe(before);
    }
    expect(failures).toBeGreaterThanOrEqual(2);
    const last = await test.db
      .selectFrom('audit_events')
      .select('kind')
      .orderBy('number', 'desc')
      .where('scope', '=', test.program.id)
      .limit(1)
      .executeTakeFirstOrThrow();
    expect(last.kind).toMatch(
      /^(configuration|frame|import|upload|list|rotors|baseline|limit|allowance|groups)\./,
    );
    if (name === 'sign') submissionId = await waitingSubmission();
  });
});

/** What `return` works on once `sign` has decided the first. */
async function waitingSubmission(): Promise<string> {
  const found = await test.db
    .selectFrom('submissions')
    .leftJoin('decisions', 'decisions.submission_id', 'submissions.id')
    .select('submissions.id')
    .where('decisions.submission_id', 'is', null)
    .executeTakeFirstOrThrow();
  return found.id;
}
