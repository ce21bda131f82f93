import { type Metadata } from 'next';
import { findFrameIssue } from '@/db/queries/frames';
import { Declared } from '@/components/lists/declared';
import { UploadForm } from '@/components/lists/upload-form';
import { PageHead, Section } from '@/components/ui/section';
import { LINK_CLASS, TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { ProgramFrame } from '../../../frame';
import { requireList } from '../list-page';

export const metadata: Metadata = { title: 'Upload a file' };

export default async function UploadPage({ params }: PageProps<'/programs/[program]/lists/[list]/upload'>) {
  const { access, list, listHref, route } = await requireList(params, 'lists.keep');
  const issue = await findFrameIssue(serverDb(), list.frame_issue_id);
  return (
    <ProgramFrame access={access} current="lists">
      <PageHead
        title="Upload a file"
        above={<TextLink href={listHref}>{list.title}</TextLink>}
        lead={`It becomes revision ${list.last_revision + 1}, whole or not at all: one wrong row refuses the file, and its page of problems says what would be right.`}
      />
      <div className="grid items-start gap-8 lg:grid-cols-[2fr_1fr]">
        <UploadForm to={`${route}/revisions`} listHref={listHref} cancelHref={listHref} />
        <Section
          title="Its figures are read as declared"
          aside={<TextLink href={`${listHref}/declarations`}>Change declarations</TextLink>}
        >
          <Declared declarations={list.declarations} issue={issue} />
          <p className="text-note text-ink-2">
            Needed are the columns item (or a unique part_number), mass, x, y and z. Files of other headings
            are mapped in the next step, and the list remembers how.{' '}
            <a
              href={`/api/internal/programs/${access.program.code}/lists/example`}
              download
              className={LINK_CLASS}
            >
              Download the example file
            </a>{' '}
            to see the others.
          </p>
        </Section>
      </div>
    </ProgramFrame>
  );
}
