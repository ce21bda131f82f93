import { type ColumnType, type Generated } from 'kysely';
import { type PlacedFinding } from '@/lib/findings/finding';
import { type ConfigurationResult } from '@/lib/loading/configuration';
import { type Json } from './lists';

/** Insert-only. What was submitted, with its results and findings as they stood then. */
export interface SubmissionsTable {
  id: string;
  program_id: string;
  build_id: string;
  configuration_id: string;
  configuration_version: number;
  frame_issue_id: string;
  rotor_revision_id: string | null;
  title: string;
  reason: string;
  marking: string | null;
  result: Json<ConfigurationResult>;
  findings: Json<PlacedFinding[]>;
  /** Index in `findings` -> the submitter's sentence. */
  answers: Json<Record<string, string>>;
  input_sha256: string;
  submitted_by: string;
  submitted_at: ColumnType<Date, Date | undefined, never>;
}

export interface SubmissionRevisionsTable {
  submission_id: string;
  list_id: string;
  revision_id: string;
}

/** Insert-only; the primary key is the submission, so that there is one decision on each. */
export interface DecisionsTable {
  submission_id: string;
  decision: 'approved' | 'returned';
  reason: Generated<string>;
  decided_by: string;
  decided_at: ColumnType<Date, Date | undefined, never>;
}

/** Insert-only. `document` is the hand-off document without `digest` and `state`, as canonical JSON (RFC 8785). */
export interface BaselinesTable {
  program_id: string;
  number: number;
  build_id: string;
  submission_id: string;
  title: string;
  supersedes: number | null;
  document: string;
  digest: string;
  signed_by: string;
  signed_at: Date;
}

export interface SupersessionsTable {
  program_id: string;
  number: number;
  superseded_by: number;
  at: Date;
}

export interface WithdrawalsTable {
  program_id: string;
  number: number;
  reason: string;
  withdrawn_by: string;
  withdrawn_at: ColumnType<Date, Date | undefined, never>;
}
