import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { type Endpoint } from '@/lib/contracts/api/endpoint';
import { ENDPOINTS } from '@/lib/contracts/api/endpoints';
import { declarationsOfQuery, rollUpAnswer, rollUpEndpoint } from '@/lib/contracts/api/roll-ups';
import { rollUpList } from '@/lib/ingest/roll-up-list';
import nextConfig from '@/next.config.mjs';
import { openApiDocument } from '@/lib/server/api/openapi/document';

interface Parameter {
  readonly name: string;
  readonly in: string;
  readonly required: boolean;
}
interface Operation {
  readonly operationId: string;
  readonly security: readonly Record<string, readonly string[]>[];
  readonly parameters?: readonly Parameter[];
  readonly responses: Readonly<Record<string, { readonly description: string; readonly content?: object }>>;
}
interface Document {
  readonly paths: Readonly<Record<string, Readonly<Record<string, Operation>>>>;
  readonly components: { readonly securitySchemes: object };
}

/** As a client reads it. */
const document = JSON.parse(JSON.stringify(openApiDocument())) as Document;
const operations = Object.entries(document.paths).flatMap(([template, item]) =>
  Object.entries(item).map(([method, operation]) => ({ template, method, operation })),
);

/** Every member of every object in a value, wherever it stands. */
function* members(value: unknown): Generator<readonly [string, unknown]> {
  if (typeof value !== 'object' || value === null) return;
  for (const [name, member] of Object.entries(value)) {
    yield [name, member];
    yield* members(member);
  }
}

/** What a JSON pointer (RFC 6901) leads to. */
function at(pointer: string): unknown {
  const steps = pointer.slice('#/'.length).split('/');
  return steps.reduce<unknown>(
    (place, step) => (place as Record<string, unknown>)[step.replaceAll('~1', '/').replaceAll('~0', '~')],
    document,
  );
}

const ROUTES = path.join(import.meta.dirname, '../../app/api/v1');

/** The path by which a place in the file tree is reached: some endings are rewrites. */
function reachedAs(template: string, rewritten: readonly { source: string; destination: string }[]): string {
  const named = (pattern: string) => pattern.slice('/api/v1'.length).replace(/:(\w+)(\([^)]*\))?/g, '{$1}');
  const rewrite = rewritten.find(({ destination }) => named(destination) === template);
  return rewrite === undefined ? template : named(rewrite.source);
}

/** What the file tree serves: `METHOD /path` in the words of the document, without the route for everything else. */
function served(rewritten: readonly { source: string; destination: string }[]): string[] {
  return readdirSync(ROUTES, { recursive: true, encoding: 'utf8' })
    .filter((file) => path.basename(file) === 'route.ts' && !file.includes('[...'))
    .flatMap((file) => {
      const place = `/${path.dirname(file).replace(/\[(\w+)\]/g, '{$1}')}`;
      const template = reachedAs(place, rewritten);
      const source = readFileSync(path.join(ROUTES, file), 'utf8');
      return [...source.matchAll(/^export const ([A-Z]+) =/gm)].map(([, method]) => `${method} ${template}`);
    });
}

describe('the OpenAPI document', () => {
  it('documents every route that the file tree serves, and no other', async () => {
    const rewritten = (await nextConfig.rewrites?.()) ?? [];
    if (!Array.isArray(rewritten)) throw new Error('rewrites are a list');
    const documented = operations.map(({ template, method }) => `${method.toUpperCase()} ${template}`);
    expect(documented.toSorted()).toEqual(served(rewritten).toSorted());
  });

  it('has only references that lead somewhere', () => {
    const references = [...members(document)].filter(([name]) => name === '$ref').map(([, to]) => String(to));
    expect(references.length).toBeGreaterThan(20);
    expect(references.filter((to) => !to.startsWith('#/components/') || at(to) === undefined)).toEqual([]);
  });

  it('keeps nothing of how its schemas were made', () => {
    const names = new Set([...members(document)].map(([name]) => name));
    expect(['$defs', '$schema', '~standard', 'id'].filter((name) => names.has(name))).toEqual([]);
  });

  it('has the members that OpenAPI 3.1 requires of document, operations and responses', () => {
    expect(document).toMatchObject({
      openapi: expect.stringMatching(/^3\.1\.\d+$/) as string,
      info: { title: 'Polhode', version: '1' },
    });
    for (const { operation } of operations) {
      expect(Object.keys(operation.responses).every((status) => /^[2-5]\d\d$/.test(status))).toBe(true);
      for (const response of Object.values(operation.responses)) expect(response.description).not.toBe('');
    }
    const names = operations.map(({ operation }) => operation.operationId);
    expect(new Set(names).size).toBe(names.length);
  });

  it.each(
    operations.map(({ template, method, operation }) => [`${method} ${template}`, template, operation]),
  )(
    'of %s declares the parameters of the path as required, and no parameter twice',
    (_name, template, { parameters = [] }) => {
      const inPath = parameters.filter((parameter) => parameter.in === 'path');
      const named = [...template.matchAll(/\{(\w+)\}/g)].map(([, name]) => name);
      expect(inPath.map(({ name }) => name).toSorted()).toEqual(named.toSorted());
      expect(inPath.every(({ required }) => required)).toBe(true);
      const keys = parameters.map((parameter) => `${parameter.in} ${parameter.name}`);
      expect(new Set(keys).size).toBe(keys.length);
    },
  );

  it('asks for a token of a scheme that it defines, or says that it asks for none', () => {
    const schemes = Object.keys(document.components.securitySchemes);
    for (const { operation } of operations) {
      for (const need of operation.security) expect(schemes).toEqual(Object.keys(need));
    }
    const open = operations.filter(({ operation }) => operation.security.length === 0);
    expect(open.map(({ template }) => template).toSorted()).toEqual(['/health', '/openapi.json']);
  });

  it('answers failures as problem details only', () => {
    for (const { operation } of operations) {
      for (const [status, { content }] of Object.entries(operation.responses)) {
        const types = Object.keys(content ?? {});
        expect(types.includes('application/problem+json'), status).toBe(Number(status) >= 400);
        expect(types.length, status).toBe(status === '304' ? 0 : 1);
      }
    }
  });
});

describe('the examples', () => {
  const answers = ENDPOINTS.flatMap((endpoint: Endpoint) =>
    Object.entries(endpoint.answers).map(
      ([status, answer]) => [`${endpoint.operationId} ${status}`, answer] as const,
    ),
  );

  it.each(answers)('of %s are what its schema says, member for member', (_name, { schema, example }) => {
    expect(schema.parse(example)).toEqual(example);
  });

  it('of JSON bodies are accepted', () => {
    const bodies = ENDPOINTS.flatMap(({ body }) => (body?.type === 'application/json' ? [body] : []));
    expect(bodies.length).toBeGreaterThan(0);
    for (const { schema, example } of bodies) expect(schema.safeParse(example).error).toBeUndefined();
  });

  it('of a roll-up is what its example file gives', async () => {
    const query = rollUpEndpoint.query.parse({ mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2' });
    const declarations = declarationsOfQuery(query);
    const bytes = new Blob([rollUpEndpoint.body.example]).stream() as AsyncIterable<Uint8Array>;
    const rolled = await rollUpList(bytes, declarations);
    if ('problems' in rolled) throw new Error('The example file has problems.');
    expect(rollUpAnswer(rolled, declarations, 'si')).toEqual(rollUpEndpoint.answers[200].example);
  });
});
