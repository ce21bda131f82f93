import { type Generated, type ColumnType } from 'kysely';

export type MailWish = 'all' | 'decisions' | 'none';

export interface UsersTable {
  id: string;
  email: string;
  name: string;
  password_hash: string | null;
  is_admin: Generated<boolean>;
  mail_wish: Generated<MailWish>;
  disabled_at: Date | null;
  created_at: Generated<Date>;
}

export interface SessionsTable {
  id: string;
  user_id: string;
  expires_at: Date;
  started_at: Generated<Date>;
  address: Generated<string>;
}

export interface MailLinksTable {
  token_hash: string;
  user_id: string;
  purpose: 'invitation' | 'password-reset';
  expires_at: Date;
  used_at: Date | null;
  created_at: Generated<Date>;
}

export interface RateLimitsTable {
  bucket: string;
  window_started_at: Date;
  count: number;
}

export interface ApiTokensTable {
  id: string;
  user_id: string;
  name: string;
  token_hash: string;
  hint: string;
  scopes: string[];
  /** null: every program that the user may see. */
  program_ids: string[] | null;
  expires_at: Date;
  last_used_at: Date | null;
  revoked_at: Date | null;
  created_at: Generated<Date>;
}

export interface IdempotencyKeysTable {
  user_id: string;
  key: string;
  request_hash: string;
  result: ColumnType<unknown, string, string>;
  created_at: Generated<Date>;
}

/** Insert-only; each row's hash covers the row before it in its scope (a program's id, or `site`). */
export interface AuditEventsTable {
  scope: string;
  number: number;
  at: Date;
  user_id: string | null;
  address: string;
  kind: string;
  subject: string;
  detail: ColumnType<Record<string, unknown>, string, never>;
  previous_hash: string;
  hash: string;
}

/** Where each chain ends, so that an event taken off its end is missed. */
export interface AuditHeadsTable {
  scope: string;
  number: number;
  hash: string;
}
