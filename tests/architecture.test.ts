import { readFileSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';

const ROOT = path.join(import.meta.dirname, '..');
const FOLDERS = ['app', 'components', 'db', 'fixtures', 'lib', 'migrations'];

interface Import {
  readonly file: string;
  readonly from: string;
}

function filesBelow(folder: string): string[] {
  return readdirSync(path.join(ROOT, folder), { withFileTypes: true, recursive: true })
    .filter((entry) => entry.isFile() && /\.tsx?$/.test(entry.name))
    .map((entry) => path.relative(ROOT, path.join(entry.parentPath, entry.name)));
}

/** Every import of a file; ours as paths from the root without ending, others by their name. */
function importsOf(file: string): Import[] {
  const text = readFileSync(path.join(ROOT, file), 'utf8');
  const found = [
    ...text.matchAll(/^\s*(?:import|export)\s[^'";]*?\sfrom\s+'([^']+)'/gm),
    ...text.matchAll(/^\s*import\s+'([^']+)'/gm),
    ...text.matchAll(/\bimport\('([^']+)'\)/gm),
  ];
  return found.map(([, from = '']) => ({ file, from: resolve(file, from) }));
}

function resolve(file: string, from: string): string {
  if (from.startsWith('@/')) return from.slice(2);
  if (from.startsWith('.')) return path.normalize(path.join(path.dirname(file), from));
  return from;
}

const IMPORTS = FOLDERS.flatMap(filesBelow).flatMap(importsOf);

/** Imports of files below `folder` that `allowed` refuses, as lines a person can act on. */
function breaches(inside: (file: string) => boolean, allowed: (one: Import) => boolean): string[] {
  return IMPORTS.filter((one) => inside(one.file) && !allowed(one)).map(
    ({ file, from }) => `${file} imports ${from}`,
  );
}

const ours = (from: string): boolean =>
  FOLDERS.some((folder) => from === folder || from.startsWith(`${folder}/`));
const below = (...folders: string[]) => {
  return (file: string): boolean => folders.some((folder) => file.startsWith(`${folder}/`));
};
const pure = (file: string): boolean => file.startsWith('lib/') && !file.startsWith('lib/server/');

describe('imports run one way', () => {
  it('sees the imports at all', () => {
    expect(IMPORTS.length).toBeGreaterThan(500);
    expect(IMPORTS.some(({ from }) => from === 'lib/mass/account')).toBe(true);
  });

  it('the pure library knows no server, database, page, component or framework', () => {
    const framework =
      /^(next|react|react-dom|react-aria-components|kysely|pg|lucia|graphile-worker|@aws-sdk|nodemailer)(\/|$)/;
    expect(
      breaches(
        pure,
        ({ from }) =>
          !below('lib/server', 'db', 'app', 'components', 'fixtures', 'migrations')(from) &&
          !framework.test(from),
      ),
    ).toEqual([]);
  });

  it('the pure library does no input or output', () => {
    expect(breaches(pure, ({ from }) => !/^(node:|fs$|path$|http)/.test(from))).toEqual([]);
    const asks = /\b(Date\.now|new Date\(\)|Math\.random|process\.|performance\.now|fetch\()/;
    const asking = FOLDERS.flatMap(filesBelow)
      .filter(pure)
      .filter((file) => asks.test(readFileSync(path.join(ROOT, file), 'utf8')));
    expect(asking).toEqual([]);
  });

  it('numerics imports nothing of ours; units and frames only numerics', () => {
    expect(breaches(below('lib/numerics'), ({ from }) => !ours(from) || below('lib/numerics')(from))).toEqual(
      [],
    );
    expect(
      breaches(
        below('lib/units', 'lib/frames'),
        ({ from }) => !ours(from) || below('lib/numerics', 'lib/units', 'lib/frames')(from),
      ),
    ).toEqual([]);
  });

  it('the algebra of mass, rotors, loading and motion never sees zod, React, the database or Next', () => {
    const core = below('lib/mass', 'lib/rotors', 'lib/loading', 'lib/motion');
    const known = below(
      'lib/numerics',
      'lib/units',
      'lib/frames',
      'lib/mass',
      'lib/rotors',
      'lib/loading',
      'lib/motion',
    );
    expect(breaches(core, ({ from }) => known(from))).toEqual([]);
  });

  it('components never import the server or the database', () => {
    expect(breaches(below('components'), ({ from }) => !below('lib/server', 'db', 'app')(from))).toEqual([]);
  });

  it('the database layer imports only the pure library', () => {
    expect(breaches(below('db'), ({ from }) => !below('lib/server', 'app', 'components')(from))).toEqual([]);
  });

  it('the server never imports pages or components, and job code never Next', () => {
    expect(breaches(below('lib/server'), ({ from }) => !below('app', 'components')(from))).toEqual([]);
    expect(
      breaches(below('lib/server/jobs', 'lib/server/commands'), ({ from }) => !/^next(\/|$)/.test(from)),
    ).toEqual([]);
  });

  it('migrations import only kysely', () => {
    expect(breaches(below('migrations'), ({ from }) => from === 'kysely')).toEqual([]);
  });

  it('the demo is loaded by the server alone', () => {
    expect(
      breaches(
        (file) => !below('fixtures', 'lib/server/demo')(file),
        ({ from }) => !below('fixtures')(from),
      ),
    ).toEqual([]);
  });
});
