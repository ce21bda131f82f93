import { inUnits } from '@/lib/baselines/document-units';
import { readStoredDocument } from '@/lib/baselines/stored-document';
import { baselineConditionEndpoint } from '@/lib/contracts/api/baseline-condition';
import { baselineQuery } from '@/lib/contracts/api/baseline-document';
import { AppError } from '@/lib/errors';
import { readQuery } from '@/lib/server/api/read-query';
import { headOf, keepable } from '@/lib/server/baselines/answer';
import { reachBaseline } from '@/lib/server/baselines/reach-baseline';
import { serverDb } from '@/lib/server/database';
import { apiProgramRoute } from '@/lib/server/http/api-route';
import { otherMethods } from '@/lib/server/http/other-methods';

const { scope } = baselineConditionEndpoint;

export const GET = apiProgramRoute<{ program: string; number: string; condition: string }>(
  { scope, action: 'baselines.read' },
  async ({ request, params, program }) => {
    const { build, units } = readQuery(request, baselineQuery);
    const baseline = await reachBaseline(serverDb(), program.id, { number: params.number, build });
    const document = readStoredDocument(baseline.document);
    const condition = document.conditions.find(({ code }) => code === params.condition);
    if (condition === undefined)
      throw new AppError(
        'not-found',
        `Baseline ${baseline.number} has these conditions: ${document.conditions.map(({ code }) => code).join(', ')}.`,
      );
    return keepable(request, baseline, `condition ${condition.code} ${units}`, () =>
      JSON.stringify(inUnits({ ...headOf(baseline, document), condition }, units)),
    );
  },
);

export const { DELETE, PATCH, POST, PUT } = otherMethods('GET');
