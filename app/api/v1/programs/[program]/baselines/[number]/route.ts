import { baselineEndpoint, baselineQuery } from '@/lib/contracts/api/baseline-document';
import { readQuery } from '@/lib/server/api/read-query';
import { documentText, keepable } from '@/lib/server/baselines/answer';
import { reachBaseline } from '@/lib/server/baselines/reach-baseline';
import { serverDb } from '@/lib/server/database';
import { apiProgramRoute } from '@/lib/server/http/api-route';
import { otherMethods } from '@/lib/server/http/other-methods';

const { scope } = baselineEndpoint;

export const GET = apiProgramRoute<{ program: string; number: string }>(
  { scope, action: 'baselines.read' },
  async ({ request, params, program }) => {
    const { build, units } = readQuery(request, baselineQuery);
    const baseline = await reachBaseline(serverDb(), program.id, { number: params.number, build });
    return keepable(request, baseline, `document ${units}`, () => documentText(baseline, units));
  },
);

export const { DELETE, PATCH, POST, PUT } = otherMethods('GET');
