import { type Metadata } from 'next';
import { ListForm } from '@/components/lists/list-form';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { declarationsToBody } from '@/lib/contracts/list-declarations';
import { listFormValues } from '@/lib/contracts/list-form';
import { ProgramFrame } from '../../../frame';
import { declareListAction } from '../../actions';
import { requireList } from '../list-page';

export const metadata: Metadata = { title: 'Change declarations' };

export default async function DeclarationsPage({
  params,
}: PageProps<'/programs/[program]/lists/[list]/declarations'>) {
  const { access, list, listHref } = await requireList(params, 'lists.keep');
  return (
    <ProgramFrame access={access} current="lists" width="narrow">
      <PageHead
        title="Change declarations"
        above={<TextLink href={listHref}>{list.title}</TextLink>}
        lead={
          list.last_revision === 0
            ? 'They say what the figures of the first file mean.'
            : `They apply to the next file that is uploaded. Revisions 1 to ${list.last_revision} keep what they were read with, and so do edits made from them. The title and the marking change at once.`
        }
      />
      <ListForm
        action={declareListAction}
        program={access.program.code}
        list={list.code}
        values={listFormValues(list.title, declarationsToBody(list.declarations))}
        cancelHref={listHref}
      />
    </ProgramFrame>
  );
}
