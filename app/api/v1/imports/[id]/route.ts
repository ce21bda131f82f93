import { mappingOfImport } from '@/db/queries/mappings';
import { importEndpoint } from '@/lib/contracts/api/imports';
import { reachImportOf } from '@/lib/server/api/reach-import';
import { respond } from '@/lib/server/api/respond';
import { serverDb } from '@/lib/server/database';
import { apiRoute } from '@/lib/server/http/api-route';
import { otherMethods } from '@/lib/server/http/other-methods';

interface ImportParams extends Record<string, string> {
  id: string;
}

export const GET = apiRoute<ImportParams>({ scope: importEndpoint.scope }, async ({ params, caller }) => {
  const found = await reachImportOf(serverDb(), caller, params.id);
  const mapped = await mappingOfImport(serverDb(), found.id);
  return respond(importEndpoint, 200, {
    import: found.id,
    program: found.program_code,
    list: found.list_code,
    state: found.state,
    rows: found.rows_done,
    ofRows: found.of_rows === null ? null : Math.max(found.of_rows, found.rows_done),
    revision: found.revision_number,
    mapping: mapped === undefined ? null : { by: mapped.author, at: mapped.created_at.toISOString() },
    errors: found.problems ?? [],
    errorCounts: found.problem_counts ?? {},
  });
});

export const { DELETE, PATCH, POST, PUT } = otherMethods('GET');
