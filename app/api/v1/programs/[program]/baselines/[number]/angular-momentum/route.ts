import { inUnits } from '@/lib/baselines/document-units';
import { readStoredDocument } from '@/lib/baselines/stored-document';
import { angularMomentumEndpoint, momentumQuery, shaftOf } from '@/lib/contracts/api/angular-momentum';
import { parametersWrong, readQuery } from '@/lib/server/api/read-query';
import { headOf, keepable } from '@/lib/server/baselines/answer';
import { momentumAt } from '@/lib/server/baselines/momentum-at';
import { reachBaseline } from '@/lib/server/baselines/reach-baseline';
import { serverDb } from '@/lib/server/database';
import { apiProgramRoute } from '@/lib/server/http/api-route';
import { otherMethods } from '@/lib/server/http/other-methods';

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
    const speeds = JSON.stringify(Object.entries(rest).sort(([a], [b]) => (a < b ? -1 : 1)));
    return keepable(request, baseline, `angular momentum ${units} ${speeds}`, () => {
      const head = headOf(baseline, readStoredDocument(baseline.document));
      return JSON.stringify(inUnits({ ...head, ...momentum }, units));
    });
  },
);

export const { DELETE, PATCH, POST, PUT } = otherMethods('GET');
