import { type ColumnType, type Generated } from 'kysely';
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
  created_by: string;
  created_at: Generated<Date>;
}

/** Insert-only. `content_sha256` covers the rows and declarations, so that a frozen revision can be checked. */
export interface ListRevisionsTable {
  id: string;
  list_id: string;
  number: number;
  declarations: Json<ListDeclarations>;
  marking: string | null;
  origin: 'file' | 'edit';
  reason: string;
  file_sha256: string | null;
  file_name: string | null;
  content_sha256: string;
  rows: number;
  memo_rows: number;
  pieces: number;
  findings: Json<Finding[]>;
  created_by: string;
  created_at: Generated<Date>;
}

/** Insert-only. SI, list axes; products are positive integrals; angles in rad; sigma in the order of SIGMA_FIELDS. */
export interface MassRowsTable {
  revision_id: string;
  position: number;
  line: number | null;
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

export type ImportState = 'waiting' | 'running' | 'done' | 'failed';

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
  finished_at: Date | null;
}

/** A worker of the job queue and the advisory lock that its process holds while it lives. */
export interface JobWorkersTable {
  worker_id: string;
  lease: number;
  started_at: Generated<Date>;
}
