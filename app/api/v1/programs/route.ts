import { buildsOfPrograms } from '@/db/queries/builds';
import { programsEndpoint } from '@/lib/contracts/api/programs';
import { respond } from '@/lib/server/api/respond';
import { serverDb } from '@/lib/server/database';
import { apiRoute } from '@/lib/server/http/api-route';
import { programsInReach } from '@/lib/server/http/token-caller';
import { otherMethods } from '@/lib/server/http/other-methods';

export const GET = apiRoute({ scope: programsEndpoint.scope }, async ({ caller }) => {
  const programs = await programsInReach(serverDb(), caller);
  const builds = await buildsOfPrograms(
    serverDb(),
    programs.map(({ id }) => id),
  );
  return respond(programsEndpoint, 200, {
    programs: programs.map(({ id, code, title }) => ({
      program: code,
      title,
      builds: builds
        .filter(({ programId }) => programId === id)
        .map((build) => ({ build: build.code, title: build.title, default: build.isDefault })),
    })),
  });
});

export const { DELETE, PATCH, POST, PUT } = otherMethods('GET');
