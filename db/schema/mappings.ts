import { type Generated } from 'kysely';
import { type Mapping } from '@/lib/ingest/mapping/mapping';
import { type LeftOutRow, type LeftOutWhy } from '@/lib/ingest/mapping/read-mapped';
import { type TotalFigure } from '@/lib/ingest/mapping/totals';
import { type Json } from './lists';

/** Insert-only. The newest for a list and its headings is the one that it remembers. */
export interface ListMappingsTable {
  id: string;
  list_id: string;
  /** Of the headings' signature. */
  headings_sha256: string;
  mapping: Json<Mapping>;
  created_by: string;
  created_at: Generated<Date>;
}

/** Insert-only: how the file of an import is read. `mapping` is the remembered one fitted to this file (where its headings stand). */
export interface ImportMappingsTable {
  import_id: string;
  mapping_id: string;
  mapping: Json<Mapping>;
  /** A person has seen that the totals row does not agree, and goes on. */
  accept_totals: boolean;
  created_at: Generated<Date>;
}

/** Insert-only: what an import that is done left out of its file, and its totals rows. */
export interface ImportReadingsTable {
  import_id: string;
  left_out: Json<LeftOut>;
  totals: Json<TotalFigure[]>;
  created_at: Generated<Date>;
}

export interface LeftOut {
  /** The first 200. */
  readonly rows: readonly LeftOutRow[];
  readonly counts: Readonly<Partial<Record<LeftOutWhy, number>>>;
}

/** A file that is stored and waits for someone to say how it is read. */
export interface PendingUploadsTable {
  id: string;
  list_id: string;
  file_sha256: string;
  file_name: string;
  bytes: number;
  lines: number;
  reason: string;
  created_by: string;
  created_at: Generated<Date>;
  import_id: string | null;
  dropped_at: Date | null;
}
