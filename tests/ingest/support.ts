import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { declarationsFromBody, listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { type MassListOptions, type MassListReading, readMassList } from '@/lib/ingest/mass-list';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';

const FIXTURES = join(import.meta.dirname, '../../fixtures');

/** Names of the fixtures of a folder, each a .csv beside its .json. */
export function fixtureNames(folder: string): string[] {
  return readdirSync(join(FIXTURES, folder))
    .filter((name) => name.endsWith('.csv'))
    .map((name) => name.slice(0, -'.csv'.length));
}

export function fixtureBytes(folder: string, name: string): Uint8Array {
  return readFileSync(join(FIXTURES, folder, `${name}.csv`));
}

/** The expectation beside a fixture; its shape is what the test that reads it says. */
export function fixtureExpectation<T>(folder: string, name: string): T {
  return JSON.parse(readFileSync(join(FIXTURES, folder, `${name}.json`), 'utf8')) as T;
}

export function declare(body: unknown = {}): ListDeclarations {
  const units = { mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2' };
  return declarationsFromBody(listDeclarationsSchema.parse({ ...units, ...(body as object) }));
}

/** A file arriving in pieces of `size` bytes. */
export async function* inPieces(bytes: Uint8Array, size = bytes.length): AsyncGenerator<Uint8Array> {
  for (let at = 0; at < bytes.length; at += Math.max(1, size))
    yield bytes.subarray(at, at + Math.max(1, size));
}

export function utf8(text: string): Uint8Array {
  return new TextEncoder().encode(text);
}

export interface ReadList extends MassListReading {
  readonly components: readonly Component[];
  readonly lines: Readonly<Record<string, number>>;
}

export async function readList(
  bytes: Uint8Array | AsyncIterable<Uint8Array>,
  declarations: ListDeclarations = declare(),
  options: Omit<MassListOptions, 'onComponent'> = {},
): Promise<ReadList> {
  const components: Component[] = [];
  const lines: Record<string, number> = {};
  const source = bytes instanceof Uint8Array ? inPieces(bytes) : bytes;
  const reading = await readMassList(source, declarations, {
    ...options,
    onComponent(component, line) {
      components.push(component);
      lines[component.item] = line;
    },
  });
  return { ...reading, components, lines };
}
