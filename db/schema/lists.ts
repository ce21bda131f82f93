import { type ColumnType, type Generated, type GeneratedAlways } from 'kysely';
import { type Category, type ChangeStatus, type Counting, type Maturity } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type Finding } from '@/lib/findings/finding';
import { type Problem } from '@/lib/ingest/problem';

/** jsonb: written as text, read as the object. */
export type Json<T> = ColumnType<T, string, string>;

export interface StoredFilesTable {
  sha256: string;
  bytes: number;
  created_at: Generated<Date>;
}

/** `declarations` apply to the next revision; each revision keeps those it was read with. */
export interface ListsTable {
  id: string;
  program_id: string;
  code: string;
  title: string;
  frame_issue_id: string;
  declarations: Json<ListDeclarations>;
  marking: string | null;
  last_revision: Generated<number>;
  /** What the list's row versions are kept by. */
  list_no: GeneratedAlways<number>;
  /** Secret: who knew it could make a changed row look unchanged. */
  fingerprint_key: GeneratedAlways<string>;
  created_by: string;
  created_at: Generated<Date>;
}

/**
 * Insert-only. `content_sha256` covers the rows and declarations, so that a frozen revision can be checked; `content_format` says
 * how. Its rows are the list's row versions up to `last_row`, without those that an end up to `last_end` names.
 */
export interface ListRevisionsTable {
  id: string;
  list_id: string;
  /** The issue that its places are stated in. */
  frame_issue_id: string;
  number: number;
  declarations: Json<ListDeclarations>;
  marking: string | null;
  origin: RevisionOrigin;
  /** Number of the revision that this one brings back. */
  restored_from: number | null;
  reason: string;
  file_sha256: string | null;
  file_name: string | null;
  content_sha256: string;
  content_format: ContentFormat;
  last_row: number;
  last_end: number;
  rows: number;
  memo_rows: number;
  pieces: number;
  findings: Json<Finding[]>;
  created_by: string;
  created_at: Generated<Date>;
}

export type RevisionOrigin = 'file' | 'edit' | 'restored';

/** 1: canonical JSON of each row. 2: each row as `lib/server/lists/row-bytes.ts` writes it. */
export type ContentFormat = 1 | 2;

/**
 * Insert-only. A row of a list as long as it stays the same, numbered within its list; `sort_key` is its place in the order of the list.
 * SI, list axes; products are positive integrals; angles in rad; sigma in the order of SIGMA_FIELDS.
 */
export interface RowVersionsTable {
  list_no: number;
  row_no: number;
  sort_key: number;
  /** Of its values, by which the next revision knows it again; null where it was stored before there were any. */
  fingerprint: string | null;
  item: string;
  part_number: string | null;
  part_revision: string | null;
  description: string | null;
  group_path: string;
  category: Category;
  parent: string | null;
  counting: Counting;
  quantity: number;
  mass: number;
  x: number;
  y: number;
  z: number;
  ixx: number;
  iyy: number;
  izz: number;
  ixy: number;
  ixz: number;
  iyz: number;
  yaw: number;
  pitch: number;
  roll: number;
  pair: boolean;
  maturity: Maturity | null;
  growth: number | null;
  sigma: (number | null)[] | null;
  source: string | null;
  source_date: string | null;
  note: string | null;
  change_ref: string | null;
  status: ChangeStatus;
  extra: Json<Record<string, string>> | null;
}

/** Insert-only. A row version that the list no longer has, numbered within its list. */
export interface RowEndsTable {
  list_no: number;
  end_no: number;
  row_no: number;
}

/** A view: the rows of every revision, `position` giving their order. For one revision `isIn` of `db/queries/revision-rows.ts` is quicker. */
export interface MassRowsView extends RowVersionsTable {
  revision_id: string;
  position: number;
}

/** Accounts about the frame issue's reference: mass, first moment (3), second moment (6), then what rounding left out of each. Insert-only. */
export interface RevisionSubtotalsTable {
  revision_id: string;
  frame_issue_id: string;
  group_path: string;
  category: Category;
  /** '' where the row states none. */
  maturity: Maturity | '';
  status: ChangeStatus;
  rows: number;
  pieces: number;
  memo_rows: number;
  basic: number[];
  stated_predicted: number[];
  unstated_basic: number[];
  /** Of each account above: mass, mass with a known σ, and the covariance of the ten numbers (55, its lower triangle). */
  basic_uncertainty: number[];
  stated_predicted_uncertainty: number[];
  unstated_basic_uncertainty: number[];
}

export type ImportState = 'waiting' | 'running' | 'done' | 'failed' | 'cancelled';

export interface ImportsTable {
  id: string;
  list_id: string;
  file_sha256: string;
  file_name: string;
  reason: string;
  state: Generated<ImportState>;
  rows_done: Generated<number>;
  of_rows: number | null;
  revision_id: string | null;
  problems: ColumnType<Problem[] | null, string | null, string | null>;
  problem_counts: ColumnType<Record<string, number> | null, string | null, string | null>;
  failure: string | null;
  created_by: string;
  created_at: Generated<Date>;
  touched_at: Generated<Date>;
  /** When its latest run began. */
  started_at: Date | null;
  finished_at: Date | null;
  /** Its file was the revision in force, which is then the one it names. */
  unchanged: Generated<boolean>;
}

/** A worker of the job queue and the advisory lock that its process holds while it lives. */
export interface JobWorkersTable {
  worker_id: string;
  lease: number;
  started_at: Generated<Date>;
}
