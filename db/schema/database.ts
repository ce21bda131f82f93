import {
  type BaselinesTable,
  type DecisionsTable,
  type SubmissionRevisionsTable,
  type SubmissionsTable,
  type SupersessionsTable,
  type WithdrawalsTable,
} from './baselines';
import {
  type ConditionItemsTable,
  type ConditionsTable,
  type ConfigurationListsTable,
  type ConfigurationsTable,
  type RollUpsTable,
  type RotorRevisionsTable,
} from './configurations';
import {
  type ImportsTable,
  type JobWorkersTable,
  type ListRevisionsTable,
  type ListsTable,
  type MassRowsView,
  type RevisionSubtotalsTable,
  type RowEndsTable,
  type RowVersionsTable,
  type StoredFilesTable,
} from './lists';
import {
  type ImportMappingsTable,
  type ImportReadingsTable,
  type ListMappingsTable,
  type PendingUploadsTable,
} from './mappings';
import {
  type ApiTokensTable,
  type AuditEventsTable,
  type AuditHeadsTable,
  type IdempotencyKeysTable,
  type MailLinksTable,
  type RateLimitsTable,
  type SessionsTable,
  type UsersTable,
} from './people';
import { type ListDraftEditsTable, type ListDraftsTable } from './drafts';
import { type ListViewsTable } from './list-views';
import {
  type BuildsTable,
  type FrameIssuesTable,
  type FrameStepsTable,
  type GroupChangesTable,
  type GrowthAllowancesTable,
  type LimitsTable,
  type ProgramMembersTable,
  type ProgramsTable,
  type ReferencePointsTable,
} from './programs';

/** Every table of the application, by its name in PostgreSQL. */
export interface Database {
  users: UsersTable;
  sessions: SessionsTable;
  mail_links: MailLinksTable;
  rate_limits: RateLimitsTable;
  api_tokens: ApiTokensTable;
  idempotency_keys: IdempotencyKeysTable;
  audit_events: AuditEventsTable;
  audit_heads: AuditHeadsTable;
  programs: ProgramsTable;
  program_members: ProgramMembersTable;
  frame_issues: FrameIssuesTable;
  frame_steps: FrameStepsTable;
  reference_points: ReferencePointsTable;
  builds: BuildsTable;
  limits: LimitsTable;
  growth_allowances: GrowthAllowancesTable;
  group_changes: GroupChangesTable;
  stored_files: StoredFilesTable;
  lists: ListsTable;
  list_revisions: ListRevisionsTable;
  row_versions: RowVersionsTable;
  row_ends: RowEndsTable;
  mass_rows: MassRowsView;
  revision_subtotals: RevisionSubtotalsTable;
  imports: ImportsTable;
  list_drafts: ListDraftsTable;
  list_draft_edits: ListDraftEditsTable;
  list_views: ListViewsTable;
  list_mappings: ListMappingsTable;
  import_mappings: ImportMappingsTable;
  import_readings: ImportReadingsTable;
  pending_uploads: PendingUploadsTable;
  rotor_revisions: RotorRevisionsTable;
  configurations: ConfigurationsTable;
  configuration_lists: ConfigurationListsTable;
  conditions: ConditionsTable;
  condition_items: ConditionItemsTable;
  roll_ups: RollUpsTable;
  job_workers: JobWorkersTable;
  submissions: SubmissionsTable;
  submission_revisions: SubmissionRevisionsTable;
  decisions: DecisionsTable;
  baselines: BaselinesTable;
  supersessions: SupersessionsTable;
  withdrawals: WithdrawalsTable;
}
