import { inUnits } from '@/lib/baselines/document-units';
import {
  angularMomentumEndpoint,
  angularMomentumSchema,
  momentumQuery,
  shaftOf,
} from '@/lib/contracts/api/angular-momentum';
import { parametersWrong, readQuery } from '@/lib/server/api/read-query';
import { respond } from '@/lib/server/api/respond';
import { documentOf, headOf } from '@/lib/server/baselines/answer';
import { momentumAt } from '@/lib/server/baselines/momentum-at';
import { reachBaseline } from '@/lib/server/baselines/reach-baseline';
import { serverDb } from '@/lib/server/database';
import { apiProgramRoute } from '@/lib/server/http/api-route';

const { scope } = angularMomentumEndpoint;
const KNOWN = ['build', 'units', 'point'];

export const GET = apiProgramRoute<{ program: string; number: string }>(
  { scope, action: 'baselines.read' },
  async ({ request, params, program }) => {
    const query = readQuery(request, momentumQuery);
    const unknown = Object.keys(query).filter((name) => !KNOWN.includes(name) && shaftOf(name) === null);
    if (unknown.length > 0)
      throw parametersWrong(
        unknown.map((parameter) => ({ parameter, message: 'There is no such parameter here.' })),
      );
    const { build, units, ...rest } = query;
    const baseline = await reachBaseline(serverDb(), program.id, { number: params.number, build });
    const momentum = await momentumAt(serverDb(), baseline, rest);
    const answer = { ...headOf(baseline, documentOf(baseline)), ...momentum };
    return respond(angularMomentumEndpoint, 200, angularMomentumSchema.parse(inUnits(answer, units)));
  },
);
