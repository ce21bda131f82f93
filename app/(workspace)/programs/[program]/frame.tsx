import { type ReactNode } from 'react';
import { markingsOf, whatWaits, type Waiting } from '@/db/queries/stations';
import { combinedMarking } from '@/lib/baselines/marking';
import { type KeyLine } from '@/components/ui/key-help';
import { type PageAccess } from '@/lib/server/http/page';
import { type ProgramAccess } from '@/lib/server/http/access';
import { serverDb } from '@/lib/server/database';
import { type StationCode, STATIONS } from '@/lib/stations';
import { WorkspaceFrame } from '../../frame';

interface ProgramFrameProps {
  readonly access: PageAccess & ProgramAccess;
  /** The station where the page belongs; absent on pages beside them. */
  readonly current?: StationCode;
  readonly keys?: readonly KeyLine[];
  readonly width?: 'wide' | 'narrow';
  readonly children: ReactNode;
}

/** The frame of every page of a program: its stations as far as the reader may see them, and its markings. */
export async function ProgramFrame({
  access,
  current,
  keys = [],
  width = 'wide',
  children,
}: ProgramFrameProps) {
  const { program, can, user } = access;
  const home = `/programs/${program.code}`;
  const stations = STATIONS.filter(({ action }) => can(action));
  const [waiting, markings] = await Promise.all([
    whatWaits(serverDb(), program.id),
    markingsOf(serverDb(), program.id),
  ]);
  return (
    <WorkspaceFrame
      user={user}
      program={{ title: program.title, href: home }}
      stations={stations.map(({ code, title }) => ({
        code,
        title,
        href: `${home}/${code}`,
        waiting: waitingAt(code, waiting, can('submissions.read')),
      }))}
      current={current ?? null}
      marking={combinedMarking(markings)}
      links={[
        ...(can('trail.read') ? [{ href: `${home}/trail`, words: 'Trail' }] : []),
        ...(can('settings.read') ? [{ href: `${home}/settings`, words: 'Settings' }] : []),
      ]}
      keys={keys}
      width={width}
    >
      {children}
    </WorkspaceFrame>
  );
}

function waitingAt(
  code: StationCode,
  waiting: Waiting,
  seesSubmissions: boolean,
): { count: number; words: string } | null {
  if (code === 'lists' && waiting.listsWithProblems > 0) {
    return { count: waiting.listsWithProblems, words: 'with problems' };
  }
  if (code === 'configurations' && waiting.configurationsToRollUp > 0) {
    return { count: waiting.configurationsToRollUp, words: 'to roll up' };
  }
  if (code === 'baselines' && seesSubmissions && waiting.submissionsToDecide > 0) {
    return { count: waiting.submissionsToDecide, words: 'to decide' };
  }
  return null;
}
