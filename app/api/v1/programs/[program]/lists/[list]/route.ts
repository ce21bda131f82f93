import { listBodySchema, saveListEndpoint } from '@/lib/contracts/api/lists';
import { codeSchema } from '@/lib/contracts/codes';
import { declarationsFromBody } from '@/lib/contracts/list-declarations';
import { parametersWrong } from '@/lib/server/api/read-query';
import { respond } from '@/lib/server/api/respond';
import { serverDb } from '@/lib/server/database';
import { apiProgramRoute } from '@/lib/server/http/api-route';
import { readJson } from '@/lib/server/http/read-json';
import { saveList } from '@/lib/server/lists/save-list';
import { otherMethods } from '@/lib/server/http/other-methods';

interface ListParams extends Record<string, string> {
  program: string;
  list: string;
}

export const PUT = apiProgramRoute<ListParams>(
  { scope: saveListEndpoint.scope, action: 'lists.keep' },
  async ({ request, params, caller, program }) => {
    const code = codeSchema.safeParse(params.list);
    if (!code.success) {
      throw parametersWrong(code.error.issues.map(({ message }) => ({ parameter: 'list', message })));
    }
    const { title, frame_issue: frameIssue, ...declared } = await readJson(request, listBodySchema);
    const { created } = await saveList(serverDb(), {
      person: caller.person,
      programId: program.id,
      code: code.data,
      title,
      declarations: declarationsFromBody(declared),
      ...(frameIssue === undefined ? {} : { frameIssue }),
    });
    const told = frameIssue === undefined ? {} : { frame_issue: frameIssue };
    const list = { program: program.code, list: code.data, title, ...declared, ...told };
    return respond(saveListEndpoint, created ? 201 : 200, list);
  },
);

export const { DELETE, GET, PATCH, POST } = otherMethods('PUT');
