import { baselineQuery } from '@/lib/contracts/api/baseline-document';
import { readQuery } from '@/lib/server/api/read-query';
import { conditionsCsv } from '@/lib/server/baselines/answer';
import { fileName } from '@/lib/server/baselines/file-name';
import { reachBaseline } from '@/lib/server/baselines/reach-baseline';
import { serverDb } from '@/lib/server/database';
import { attachment, CSV_TYPE } from '@/lib/server/http/attachment';
import { programRoute } from '@/lib/server/http/internal-route';

/** The conditions of a signed baseline as a CSV file, byte for byte as the API answers it. */
export const GET = programRoute<{ program: string; number: string }>(
  'baselines.read',
  async ({ request, params, program }) => {
    const { build, units } = readQuery(request, baselineQuery);
    const baseline = await reachBaseline(serverDb(), program.id, { number: params.number, build });
    return attachment(conditionsCsv(baseline, units), {
      name: fileName(program.code, baseline, units, 'csv'),
      type: CSV_TYPE,
    });
  },
);
