import { spawnSync } from 'node:child_process';
import path from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = path.join(import.meta.dirname, '../../..');

/** Runs the command with an environment that names no service at all. */
function rollUp(...words: string[]) {
  const env: NodeJS.ProcessEnv = { NODE_ENV: 'production', PATH: process.env['PATH'] };
  return spawnSync(process.execPath, ['--import', 'tsx', 'lib/server/commands/roll-up.ts', ...words], {
    cwd: ROOT,
    env,
    encoding: 'utf8',
  });
}

const SI = ['--mass-unit', 'kg', '--length-unit', 'm', '--inertia-unit', 'kg.m2'];

describe('npm run roll-up', () => {
  // NASA/TM-2015-218675, two-stage rocket, twostage_inertia.dml 2013-08-09: liftoff, printed to these digits.
  it('prints the published roll-up of the two-stage rocket at liftoff, with no database and no network', () => {
    const { stdout, stderr, status } = rollUp('fixtures/lists/valid/two-stage-rocket-liftoff.csv', ...SI);
    expect(stderr).toBe('');
    expect(status).toBe(0);
    const answer = JSON.parse(stdout) as {
      mass: number;
      cg: { airframe: { x: number } };
      inertia: { ixx: number; iyy: number; izz: number };
      conventions: { products: string };
    };
    expect(answer.mass).toBe(314000);
    expect(answer.cg.airframe.x).toBeCloseTo(16.91879, 5);
    expect(answer.inertia.ixx).toBeCloseTo(353250, 6);
    expect(answer.inertia.iyy).toBeCloseTo(33501637.473461, 5);
    expect(answer.inertia.izz).toBeCloseTo(33501637.473461, 5);
    expect(answer.conventions.products).toBe('positive integral');
  });

  it('names line and column of a wrong file, prints no result and ends with 1', () => {
    const { stdout, stderr, status } = rollUp('fixtures/lists/invalid/nan.csv', ...SI);
    expect(status).toBe(1);
    expect(stdout).toBe('');
    expect(stderr).toContain('Line 2, column mass');
  });

  it('refuses a list without a declared unit and names the option', () => {
    const { stderr, status } = rollUp('fixtures/lists/valid/minimal.csv', '--mass-unit', 'kg');
    expect(status).toBe(1);
    expect(stderr).toContain('--length-unit');
    expect(stderr).toContain('--inertia-unit');
  });
});
