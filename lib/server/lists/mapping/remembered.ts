import { createHash } from 'node:crypto';
import { type Db } from '@/db/client';
import { rememberedMapping } from '@/db/queries/mappings';
import { findHeader, headingsOf } from '@/lib/ingest/mapping/find-header';
import { type FileSample } from '@/lib/ingest/mapping/grid';
import { type Mapping } from '@/lib/ingest/mapping/mapping';
import { headingSignature } from '@/lib/ingest/mapping/signature';

export interface Remembered {
  readonly id: string;
  /** Fitted to the file: its delimiter or sheet, and where its headings stand. */
  readonly mapping: Mapping;
  readonly author: string;
  readonly at: Date;
}

export function headingsSha256(headings: readonly string[]): string {
  return createHash('sha256').update(headingSignature(headings)).digest('hex');
}

/** The mapping that a list remembers for a file of these headings, wherever in its first rows they stand; null without one. */
export async function rememberedFor(db: Db, listId: string, sample: FileSample): Promise<Remembered | null> {
  const seen = new Set<string>();
  const found = findHeader(sample.head);
  const places = [
    ...(found === null ? [] : [found]),
    ...sample.head.slice(0, 40).map(({ line }) => ({ first: line, last: line })),
  ];
  for (const { first, last } of places) {
    const headings = headingsOf(sample.head, { first, last });
    const key = headingsSha256(headings);
    if (headings.length === 0 || seen.has(key)) continue;
    seen.add(key);
    const kept = await rememberedMapping(db, listId, key);
    if (kept === undefined) continue;
    const { delimiter, sheet } = sample;
    const columns = kept.mapping.columns.map(({ to }, index) => ({ heading: headings[index] ?? '', to }));
    return {
      id: kept.id,
      mapping: { ...kept.mapping, delimiter, sheet, header: { first, last }, columns },
      author: kept.author,
      at: kept.created_at,
    };
  }
  return null;
}
