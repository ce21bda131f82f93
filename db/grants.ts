import { type Database } from './schema/database';

type Right = 'select' | 'insert' | 'update' | 'delete';

/**
 * What the application's role may do with each table; what is insert-only here cannot be altered by the application at all.
 * The migration command revokes everything else.
 */
export const APPLICATION_RIGHTS: Readonly<Record<keyof Database, readonly Right[]>> = {
  users: ['select', 'insert', 'update'],
  sessions: ['select', 'insert', 'update', 'delete'],
  mail_links: ['select', 'insert', 'update', 'delete'],
  rate_limits: ['select', 'insert', 'update', 'delete'],
  api_tokens: ['select', 'insert', 'update'],
  idempotency_keys: ['select', 'insert', 'update', 'delete'],
  audit_events: ['select', 'insert'],
  audit_heads: ['select', 'insert', 'update'],
  programs: ['select', 'insert', 'update'],
  program_members: ['select', 'insert', 'update', 'delete'],
  frame_issues: ['select', 'insert'],
  frame_steps: ['select', 'insert'],
  reference_points: ['select', 'insert'],
  builds: ['select', 'insert', 'update'],
  limits: ['select', 'insert', 'update', 'delete'],
  growth_allowances: ['select', 'insert', 'update', 'delete'],
  group_changes: ['select', 'insert'],
  stored_files: ['select', 'insert'],
  lists: ['select', 'insert', 'update'],
  list_revisions: ['select', 'insert'],
  row_versions: ['select', 'insert'],
  row_ends: ['select', 'insert'],
  mass_rows: ['select'],
  revision_subtotals: ['select', 'insert'],
  imports: ['select', 'insert', 'update'],
  list_drafts: ['select', 'insert', 'update', 'delete'],
  list_draft_edits: ['select', 'insert', 'update', 'delete'],
  list_mappings: ['select', 'insert'],
  import_mappings: ['select', 'insert'],
  import_readings: ['select', 'insert'],
  pending_uploads: ['select', 'insert', 'update'],
  rotor_revisions: ['select', 'insert'],
  configurations: ['select', 'insert', 'update'],
  configuration_lists: ['select', 'insert', 'update', 'delete'],
  conditions: ['select', 'insert', 'update', 'delete'],
  condition_items: ['select', 'insert', 'update', 'delete'],
  roll_ups: ['select', 'insert'],
  job_workers: ['select', 'insert', 'delete'],
  submissions: ['select', 'insert'],
  submission_revisions: ['select', 'insert'],
  decisions: ['select', 'insert'],
  baselines: ['select', 'insert'],
  supersessions: ['select', 'insert'],
  withdrawals: ['select', 'insert'],
};
