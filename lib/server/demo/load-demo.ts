import type pg from 'pg';
import { type Db } from '@/db/client';
import { makeDemo } from '@/fixtures/demo/demo';
import { loadBaselines } from './load-baselines';
import { loadLists } from './load-lists';
import { loadPeople } from './load-people';
import { loadProgram } from './load-program';
import { loadRotors } from './load-rotors';

/** What loading the demo needs, and who is who in it. */
export interface DemoServices {
  readonly db: Db;
  readonly pool: pg.Pool;
  /** The one password of all demo people. */
  readonly password: string;
}

/**
 * Loads the demo program by the product's own use cases, so that its trail, files and mails are those of a program that people
 * have worked on. Does nothing when the program is there already.
 */
export async function loadDemo(services: DemoServices): Promise<void> {
  const { db } = services;
  const demo = makeDemo();
  const known = await db
    .selectFrom('programs')
    .select('id')
    .where('code', '=', demo.program.code)
    .executeTakeFirst();
  if (known) return;
  const people = await loadPeople(services, demo.people);
  const program = await loadProgram(services, demo, people);
  await loadLists(services, demo, program, people);
  await loadRotors(services, demo, program, people);
  await loadBaselines(services, demo, program, people);
}
