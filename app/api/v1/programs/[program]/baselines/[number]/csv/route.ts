import { baselineCsvEndpoint } from '@/lib/contracts/api/baseline-csv';
import { baselineQuery } from '@/lib/contracts/api/baseline-document';
import { readQuery } from '@/lib/server/api/read-query';
import { conditionsCsv, keepable } from '@/lib/server/baselines/answer';
import { reachBaseline } from '@/lib/server/baselines/reach-baseline';
import { serverDb } from '@/lib/server/database';
import { CSV_TYPE } from '@/lib/server/http/attachment';
import { apiProgramRoute } from '@/lib/server/http/api-route';
import { otherMethods } from '@/lib/server/http/other-methods';

const { scope } = baselineCsvEndpoint;

/** Served as `{number}.csv`, by a rewrite. */
export const GET = apiProgramRoute<{ program: string; number: string }>(
  { scope, action: 'baselines.read' },
  async ({ request, params, program }) => {
    const { build, units } = readQuery(request, baselineQuery);
    const baseline = await reachBaseline(serverDb(), program.id, { number: params.number, build });
    return keepable(request, baseline, `csv ${units}`, () => conditionsCsv(baseline, units), CSV_TYPE);
  },
);

export const { DELETE, PATCH, POST, PUT } = otherMethods('GET');
