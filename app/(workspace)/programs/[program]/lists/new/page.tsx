import { type Metadata } from 'next';
import { programFrames } from '@/db/queries/program-frames';
import { ListForm } from '@/components/lists/list-form';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from '../../frame';
import { addListAction } from '../actions';

export const metadata: Metadata = { title: 'Add list' };

/** What a new list begins with: nothing where a guess could be wrong, the usual where it is harmless. */
const BEGINNING = {
  axis_x: 'aft',
  axis_y: 'right',
  axis_z: 'up',
  kind: 'components',
  extent: 'whole',
  uncertainty: '1sigma',
};

export default async function NewListPage({ params }: PageProps<'/programs/[program]/lists/new'>) {
  const access = await requireProgram((await params).program, 'lists.keep');
  const frames = await programFrames(serverDb(), access.program.id);
  const home = `/programs/${access.program.code}/lists`;
  return (
    <ProgramFrame access={access} current="lists" width="narrow">
      <PageHead
        title="Add list"
        above={<TextLink href={home}>Lists</TextLink>}
        lead="Declare what the figures of its files mean. All of it can be changed later, for files to come."
      />
      <ListForm
        action={addListAction}
        program={access.program.code}
        list={null}
        issues={frames.issues.map((issue) => ({ ...issue, ...frames.geometry(issue.id) }))}
        example={null}
        values={{ ...BEGINNING, frame_issue: String(frames.issues[0]?.number ?? '') }}
        cancelHref={home}
      />
    </ProgramFrame>
  );
}
