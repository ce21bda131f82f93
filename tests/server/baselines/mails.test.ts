import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { findConfiguration } from '@/db/queries/configurations';
import { findBaseline, findSubmission } from '@/db/queries/baselines';
import { mailWishOf } from '@/db/queries/people';
import { type MailWish } from '@/db/schema/people';
import { CAUTION } from '@/lib/baselines/caution';
import { SITE_SCOPE } from '@/lib/server/audit/record-event';
import { returnSubmission } from '@/lib/server/baselines/return-submission';
import { signSubmission } from '@/lib/server/baselines/sign-submission';
import { submitConfiguration } from '@/lib/server/baselines/submit-configuration';
import { withdrawBaseline } from '@/lib/server/baselines/withdraw-baseline';
import { createConfiguration } from '@/lib/server/configurations/create-configuration';
import { sendMailTask } from '@/lib/server/jobs/tasks/send-mail';
import { setMailWish } from '@/lib/server/people/set-mail-wish';
import { clearMails, linkIn, mailsTo } from '@/tests/support/mailbox';
import { queuedJobs } from '@/tests/support/people';
import { type Crew, type ProgramUnderTest, programUnderTest, reviseList } from '@/tests/support/program';

const HELPERS = undefined as never;
const EVERYBODY = ['weights', 'weights2', 'chief', 'chief2', 'simulation', 'admin'] as const;

let test: ProgramUnderTest;
let delivered = 0;
let made = 0;

beforeAll(async () => {
  test = await programUnderTest();
  await reviseList(
    test,
    test.crew.weights,
    'all',
    'item,mass,x,y,z,ixx,iyy,izz\na,900,6.5,0,1,500,4000,4200\n',
  );
});

afterAll(() => test.close());

/** Sends what waits in the queue, as the worker would. */
async function deliver(): Promise<void> {
  const jobs = await queuedJobs(test.pool, 'send-mail');
  for (const job of jobs.slice(delivered)) await sendMailTask(job, HELPERS);
  delivered = jobs.length;
}

const address = (name: string): string => `${name}@skerry.example`;

/** Empties every mailbox, does something, delivers, and says who has a mail and where its link leads. */
async function mailsOf(
  work: () => Promise<unknown>,
): Promise<{ to: string; subject: string; path: string; text: string }[]> {
  await deliver();
  for (const name of EVERYBODY) await clearMails(address(name));
  await work();
  await deliver();
  const arrived = await Promise.all(
    EVERYBODY.map(async (name) => (await mailsTo(address(name))).map((mail) => ({ name, mail }))),
  );
  return arrived.flat().map(({ name, mail }) => ({
    to: name,
    subject: mail.subject,
    path: new URL(linkIn(mail)).pathname,
    text: mail.text,
  }));
}

async function submit(): Promise<string> {
  const { db, program, crew } = test;
  made += 1;
  const code = `c-${made}`;
  await createConfiguration(db, {
    person: crew.weights,
    programId: program.id,
    buildCode: 'design',
    code,
    title: code,
  });
  const configuration = await findConfiguration(db, program.id, code);
  if (configuration === undefined) throw new Error('no configuration');
  return submitConfiguration(db, {
    person: crew.weights,
    program,
    configuration,
    version: configuration.version,
    title: `Title of ${code}`,
    reason: 'because the test says so',
    answers: {},
  });
}

const sign = (submissionId: string) =>
  signSubmission(test.db, { person: test.crew.chief, program: test.program, submissionId });

/** The submission or baseline that the path of a link leads to. */
async function found(path: string) {
  const { db, program } = test;
  const [, id] = new RegExp(`^/programs/${program.code}/baselines/submissions/([^/]+)$`).exec(path) ?? [];
  if (id !== undefined) return findSubmission(db, program.id, id);
  const [, number] = new RegExp(`^/programs/${program.code}/baselines/(\\d+)$`).exec(path) ?? [];
  return number === undefined ? undefined : findBaseline(db, program.id, Number(number));
}

describe('a mail', () => {
  let submission: string;

  it('of a submission reaches the chief engineers, with the caution and a link to the submission', async () => {
    const mails = await mailsOf(async () => {
      submission = await submit();
    });
    expect(mails.map(({ to }) => to)).toEqual(['chief', 'chief2']);
    for (const { path, text, subject } of mails) {
      expect(await found(path)).toMatchObject({ id: submission });
      expect(text).toContain(CAUTION);
      expect(subject).toBe('Test hopper: "Title of c-1" waits for a decision');
    }
  });

  it('of a return reaches whoever submitted it, with the reasons', async () => {
    const mails = await mailsOf(() =>
      returnSubmission(test.db, {
        person: test.crew.chief,
        program: test.program,
        submissionId: submission,
        reason: 'weigh the tank bay first',
      }),
    );
    expect(mails.map(({ to }) => to)).toEqual(['weights']);
    expect(mails[0]?.text).toContain('weigh the tank bay first');
    expect(await found(mails[0]?.path ?? '')).toMatchObject({ id: submission, decision: 'returned' });
  });

  it('of a signature reaches the simulation engineers and whoever submitted it, with digest and link', async () => {
    const id = await submit();
    let digest = '';
    const mails = await mailsOf(async () => {
      ({ digest } = await sign(id));
    });
    expect(mails.map(({ to }) => to)).toEqual(['weights', 'simulation']);
    for (const { path, text } of mails) {
      expect(await found(path)).toMatchObject({ number: 1, state: 'current' });
      expect(text).toContain(digest);
    }
  });

  it('of a withdrawal reaches every member but who withdrew it, with the reason', async () => {
    const mails = await mailsOf(() =>
      withdrawBaseline(test.db, {
        person: test.crew.chief2,
        program: test.program,
        number: 1,
        reason: 'the wing list was the old one',
      }),
    );
    expect(mails.map(({ to }) => to)).toEqual(['weights', 'weights2', 'chief', 'simulation']);
    for (const { path, text } of mails) {
      expect(await found(path)).toMatchObject({ number: 1, state: 'withdrawn' });
      expect(text).toContain('the wing list was the old one');
    }
  });
});

describe('mail wishes', () => {
  const wish = (name: keyof Crew, wanted: MailWish) =>
    setMailWish(test.db, { person: test.crew[name], wish: wanted });

  it('are kept, with an event that says what they were', async () => {
    const { db, crew } = test;
    expect(await mailWishOf(db, crew.chief.userId)).toBe('all');
    await wish('chief', 'decisions');
    await wish('chief', 'decisions');
    expect(await mailWishOf(db, crew.chief.userId)).toBe('decisions');
    const events = await db
      .selectFrom('audit_events')
      .select(['subject', 'detail'])
      .where('scope', '=', SITE_SCOPE)
      .where('kind', '=', 'user.mail-wish-set')
      .execute();
    expect(events).toEqual([{ subject: 'chief@skerry.example', detail: { from: 'all', to: 'decisions' } }]);
  });

  it.each([
    ['all', true, true],
    ['decisions', false, true],
    ['none', false, false],
  ] as const)(
    '%s: a submission comes %s, a decision comes %s',
    async (wanted, submissionComes, decisionComes) => {
      await wish('chief2', wanted);
      await wish('chief', 'all');
      let id = '';
      const submitted = await mailsOf(async () => {
        id = await submit();
      });
      expect(submitted.some(({ to }) => to === 'chief2')).toBe(submissionComes);
      const { number } = await sign(id);
      const withdrawn = await mailsOf(() =>
        withdrawBaseline(test.db, {
          person: test.crew.chief,
          program: test.program,
          number,
          reason: 'for the test',
        }),
      );
      expect(withdrawn.some(({ to }) => to === 'chief2')).toBe(decisionComes);
    },
  );
});
