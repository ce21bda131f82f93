import { spawn } from 'node:child_process';
import { closeSync, mkdirSync, openSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { Failure } from './failure.mjs';
import { ROOT } from './places.mjs';

/** Ends a child when the process that started it dies without a word, so that none is left behind. */
const WITH_PARENT = ['--import', path.join(ROOT, 'lib/server/commands/local/with-parent.mjs')];
const QUIET = { NEXT_TELEMETRY_DISABLED: '1', AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true' };
const TSX = ['--import', 'tsx'];

/**
 * @typedef {object} ChildOptions
 * @property {string} name what messages call it
 * @property {string[]} args arguments of node
 * @property {NodeJS.Dict<string>} env the whole environment
 * @property {string} [log] a file for its output; without it the terminal
 * @property {boolean} [typescript] run through tsx
 */

/** The processes that one command has started; each leads a group of its own, so that Ctrl-C reaches us first. */
export class Children {
  #running = new Map();
  #stopping = false;

  /**
   * @param {ChildOptions} options
   * @returns {import('node:child_process').ChildProcess}
   */
  #spawn({ name, args, env, log, typescript = false }) {
    if (this.#stopping) throw new Failure(`${name} was not started: everything is being stopped.`);
    if (log) mkdirSync(path.dirname(log), { recursive: true });
    const out = log ? openSync(log, 'a') : 'inherit';
    const child = spawn(process.execPath, [...WITH_PARENT, ...(typescript ? TSX : []), ...args], {
      cwd: ROOT,
      env: { ...env, ...QUIET, POLHODE_PARENT: String(process.pid) },
      detached: true,
      stdio: ['ignore', out, out, 'ipc'],
    });
    if (typeof out === 'number') closeSync(out);
    this.#running.set(child, name);
    child.once('exit', () => this.#running.delete(child));
    return child;
  }

  /**
   * Runs a child to its end; throws a Failure if that is not success.
   * @param {ChildOptions} options
   */
  async finish(options) {
    const child = this.#spawn(options);
    const how = await new Promise((resolve, reject) => {
      child.once('error', reject);
      child.once('exit', (code, signal) => resolve(signal ?? code));
    });
    if (how === 0) return;
    throw new Failure(`${options.name} failed (${how}).${tail(options.log)}`);
  }

  /**
   * Starts a service and waits until `ready` resolves. `onDeath` hears if it ends later without being asked to.
   * @param {ChildOptions} options
   * @param {(child: import('node:child_process').ChildProcess) => Promise<unknown>} ready
   * @param {(message: string) => void} onDeath
   */
  async serve(options, ready, onDeath) {
    const child = this.#spawn(options);
    let isReady = false;
    const died = new Promise((resolve) => {
      child.once('error', (error) => resolve(`${options.name} could not be started: ${error.message}`));
      child.once('exit', (code, signal) => {
        const message = `${options.name} ended (${signal ?? code}).${tail(options.log)}`;
        if (isReady && !this.#stopping) onDeath(message);
        resolve(message);
      });
    });
    const failure = await Promise.race([ready(child).then(() => null), died]);
    if (failure !== null) throw new Failure(failure);
    isReady = true;
  }

  /**
   * Ends all children, the last started first: SIGTERM, and SIGKILL for what is still there after `patience` ms.
   * @param {number} [patience]
   */
  async stop(patience = 8000) {
    this.#stopping = true;
    for (const child of [...this.#running.keys()].reverse()) {
      const gone = new Promise((resolve) => child.once('exit', resolve));
      signalGroup(child, 'SIGTERM');
      const timer = setTimeout(() => signalGroup(child, 'SIGKILL'), patience);
      await gone;
      clearTimeout(timer);
    }
  }

  /** Ends all children at once. */
  kill() {
    this.#stopping = true;
    for (const child of this.#running.keys()) signalGroup(child, 'SIGKILL');
  }
}

function signalGroup(child, signal) {
  try {
    process.kill(-child.pid, signal);
  } catch (error) {
    if (error.code !== 'ESRCH') throw error;
  }
}

function tail(log) {
  if (!log) return '';
  const lines = readFileSync(log, 'utf8').trimEnd().split('\n').slice(-30);
  return ` The end of ${path.relative(ROOT, log)}:\n${lines.join('\n')}`;
}

/**
 * Resolves when the child says so over its channel.
 * @param {import('node:child_process').ChildProcess} child
 */
export function saysReady(child) {
  return new Promise((resolve) => {
    child.on('message', (message) => {
      if (message === 'ready') resolve(undefined);
    });
  });
}

/**
 * Resolves when `url` answers, whatever the status.
 * @param {string} url
 * @param {number} [patience] ms
 */
export async function answers(url, patience = 120_000) {
  const until = Date.now() + patience;
  for (;;) {
    try {
      await fetch(url, { redirect: 'manual', signal: AbortSignal.timeout(20_000) });
      return;
    } catch (error) {
      if (Date.now() > until)
        throw new Failure(`${url} does not answer: ${error.cause?.message ?? error.message}`);
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
  }
}
