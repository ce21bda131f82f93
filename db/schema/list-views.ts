import { type Generated } from 'kysely';

/** One person's own; `query` is what stands in the address of the list's page. */
export interface ListViewsTable {
  id: string;
  list_id: string;
  user_id: string;
  name: string;
  query: string;
  created_at: Generated<Date>;
  changed_at: Generated<Date>;
}
