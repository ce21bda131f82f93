import { ROTOR_FILE_BYTES, rotorFileAnswerSchema, rotorFileSchema } from '@/lib/contracts/rotors';
import { serverDb } from '@/lib/server/database';
import { programRoute } from '@/lib/server/http/internal-route';
import { inputErrorOf } from '@/lib/server/http/read-json';
import { receiveRotorFile } from '@/lib/server/rotors/receive-rotor-file';

/** A CSV of rotating parts or operating points as the body; what it is, the reason and the base revision stand in the query. */
export const POST = programRoute<{ program: string }>(
  'rotors.keep',
  async ({ request, person, program }) => {
    const query = rotorFileSchema.safeParse(Object.fromEntries(new URL(request.url).searchParams));
    if (!query.success) throw inputErrorOf(query.error);
    const answer = await receiveRotorFile(serverDb(), {
      person,
      programId: program.id,
      request,
      file: query.data,
    });
    const body = rotorFileAnswerSchema.parse(answer);
    return Response.json(body, { status: body.status === 'revised' ? 201 : 200 });
  },
  { maxBytes: ROTOR_FILE_BYTES },
);
