import { baselinesOfProgram } from '@/db/queries/baselines';
import { buildsOf } from '@/db/queries/settings';
import { baselineListEndpoint, baselineListQuery } from '@/lib/contracts/api/baseline-list';
import { parametersWrong, readQuery } from '@/lib/server/api/read-query';
import { respond } from '@/lib/server/api/respond';
import { serverDb } from '@/lib/server/database';
import { apiProgramRoute } from '@/lib/server/http/api-route';
import { otherMethods } from '@/lib/server/http/other-methods';

const { scope } = baselineListEndpoint;

export const GET = apiProgramRoute({ scope, action: 'baselines.read' }, async ({ request, program }) => {
  const { build, state } = readQuery(request, baselineListQuery);
  const builds = await buildsOf(serverDb(), program.id);
  if (build !== undefined && !builds.some(({ code }) => code === build))
    throw parametersWrong([
      {
        parameter: 'build',
        message: `Builds of this program: ${builds.map(({ code }) => code).join(', ')}.`,
      },
    ]);
  const baselines = await baselinesOfProgram(serverDb(), program.id);
  return respond(baselineListEndpoint, 200, {
    baselines: baselines
      .filter(
        (one) =>
          (build === undefined || one.build_code === build) && (state === undefined || one.state === state),
      )
      .map((one) => ({
        baseline: one.number,
        build: one.build_code,
        state: one.state,
        title: one.title,
        digest: one.digest,
        approved: { at: one.signed_at.toISOString(), by: one.signer },
      })),
  });
});

export const { DELETE, PATCH, POST, PUT } = otherMethods('GET');
