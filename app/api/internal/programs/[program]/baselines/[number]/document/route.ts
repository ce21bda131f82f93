import { baselineQuery } from '@/lib/contracts/api/baseline-document';
import { readQuery } from '@/lib/server/api/read-query';
import { documentText } from '@/lib/server/baselines/answer';
import { fileName } from '@/lib/server/baselines/file-name';
import { reachBaseline } from '@/lib/server/baselines/reach-baseline';
import { serverDb } from '@/lib/server/database';
import { attachment } from '@/lib/server/http/attachment';
import { programRoute } from '@/lib/server/http/internal-route';

/** The hand-off document as a file, byte for byte as the API answers it. */
export const GET = programRoute<{ program: string; number: string }>(
  'baselines.read',
  async ({ request, params, program }) => {
    const { build, units } = readQuery(request, baselineQuery);
    const baseline = await reachBaseline(serverDb(), program.id, { number: params.number, build });
    return attachment(documentText(baseline, units), {
      name: fileName(program.code, baseline, units, 'json'),
      type: 'application/json',
    });
  },
);
