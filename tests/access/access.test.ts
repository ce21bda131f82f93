import { readdirSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { PROGRAM_ACTIONS, SITE_ACTIONS } from '@/lib/permissions';
import {
  declaredByActions,
  declaredByPage,
  declaredByRoute,
  hasInlineAction,
  isActionModule,
} from './declared';
import { ACCESS, ENTRIES } from './table';

const SOURCES = ['app', 'components', 'lib'].flatMap((folder) =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .filter((file) => /\.tsx?$/.test(file))
    .map((file) => path.posix.join(folder, file)),
);

const pages = SOURCES.filter((file) => /^app\/(.*\/)?page\.tsx?$/.test(file));
const routes = SOURCES.filter((file) => /^app\/(.*\/)?route\.tsx?$/.test(file));
const actions = SOURCES.filter(isActionModule);
const reachable = [...pages, ...routes, ...actions].sort();

it('lists every page, route and server action that there is, and no others', () => {
  expect(pages.length).toBeGreaterThan(5);
  expect(routes.length).toBeGreaterThan(5);
  expect(actions.length).toBeGreaterThan(5);
  expect(Object.keys(ACCESS).sort()).toEqual(reachable);
});

it('finds server actions in modules of their own only, where the table can name them', () => {
  expect(SOURCES.filter(hasInlineAction)).toEqual([]);
});

describe('what a file asks is what the table says of it', () => {
  it.each(pages)('%s', (file) => {
    const declared = declaredByPage(file);
    const listed = ACCESS[file]?.['page'];
    expect(declared).toEqual({ page: listed === 'public' ? 'unguarded' : listed });
  });

  it.each(routes)('%s', (file) => {
    expect(declaredByRoute(file)).toEqual(ACCESS[file]);
  });

  it.each(actions)('%s', (file) => {
    expect(declaredByActions(file)).toEqual(ACCESS[file]);
  });
});

it('names only actions of the permission table', () => {
  const site: readonly string[] = SITE_ACTIONS;
  const program: readonly string[] = PROGRAM_ACTIONS;
  for (const { file, name, asks } of ENTRIES) {
    for (const { kind, action } of asks) {
      const known = kind === 'site' ? site : kind === 'program' ? program : ['', ...program];
      expect(known, `${file} ${name}`).toContain(action);
    }
  }
});

it('keeps what is open to everybody to sign-in, links from mail, and the API’s own description', () => {
  const open = ENTRIES.filter(({ asks }) => asks.some(({ kind }) => kind === 'public')).map(
    ({ file }) => file,
  );
  expect(
    open.every((file) => /^app\/(\(auth\)|api\/v1\/(openapi\.json|health|\[\.\.\.path\]))\//.test(file)),
  ).toBe(true);
});

it('has internal routes on sessions only, and the API on tokens only', () => {
  for (const { file, name, asks } of ENTRIES) {
    const kinds = asks.map(({ kind }) => kind);
    if (file.startsWith('app/api/v1/'))
      expect(['public', 'token'], `${file} ${name}`).toEqual(expect.arrayContaining(kinds));
    if (file.startsWith('app/api/internal/')) {
      expect(['site', 'program'], `${file} ${name}`).toEqual(expect.arrayContaining(kinds));
    }
  }
});
