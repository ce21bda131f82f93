import { type Metadata } from 'next';
import { redirect } from 'next/navigation';
import { findFrameIssue } from '@/db/queries/frames';
import { Declared } from '@/components/lists/declared';
import { MappingDesk } from '@/components/lists/mapping/mapping-desk';
import { Banner } from '@/components/ui/banner';
import { ButtonLink } from '@/components/ui/button';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { CsvFault } from '@/lib/ingest/csv/fault';
import { type FileSample } from '@/lib/ingest/mapping/grid';
import { problemSentence } from '@/lib/ingest/problem-log';
import { serverDb } from '@/lib/server/database';
import { sampleOf } from '@/lib/server/lists/mapping/file-rows';
import { reachUpload } from '@/lib/server/lists/mapping/reach-upload';
import { rememberedFor } from '@/lib/server/lists/mapping/remembered';
import { WorkbookRefused } from '@/lib/server/sheets/refused';
import { openObject } from '@/lib/server/storage/open-object';
import { ProgramFrame } from '../../../../frame';
import { orNotFound, requireList } from '../../list-page';

export const metadata: Metadata = { title: 'Map the columns' };

/** A file that waits for someone to say what its columns are. */
export default async function MappingPage({
  params,
}: PageProps<'/programs/[program]/lists/[list]/uploads/[upload]'>) {
  const { access, list, listHref, route } = await requireList(params, 'lists.keep');
  const { upload: id } = await params;
  const db = serverDb();
  const upload = await orNotFound(() => reachUpload(db, list, id));
  if (upload.import_id !== null) redirect(`${listHref}/imports/${upload.import_id}`);
  const sample =
    upload.dropped_at === null
      ? await sampleOrWords(upload.file_sha256)
      : 'This file was dropped. Upload it again to read it.';
  const remembered = typeof sample === 'string' ? null : await rememberedFor(db, list.id, sample);
  return (
    <ProgramFrame access={access} current="lists">
      <PageHead
        title={upload.file_name}
        above={<TextLink href={listHref}>{list.title}</TextLink>}
        lead={upload.reason}
      />
      {typeof sample === 'string' ? (
        <Banner
          severity="blocker"
          word="Not read"
          title={sample}
          action={<ButtonLink href={`${listHref}/upload`}>Upload again</ButtonLink>}
        />
      ) : (
        <div className="grid items-start gap-8 xl:grid-cols-[minmax(0,3fr)_minmax(0,1fr)]">
          <MappingDesk
            sample={sample}
            declarations={list.declarations}
            remembered={
              remembered === null
                ? null
                : {
                    mapping: remembered.mapping,
                    by: `${remembered.author} mapped it on ${remembered.at.toISOString().slice(0, 10)}`,
                  }
            }
            route={`${route}/uploads/${upload.id}`}
            listHref={listHref}
            nextRevision={list.last_revision + 1}
          />
          <Section
            title="Declared for the list"
            aside={<TextLink href={`${listHref}/declarations`}>Change declarations</TextLink>}
          >
            <Declared
              declarations={list.declarations}
              issue={await findFrameIssue(serverDb(), list.frame_issue_id)}
            />
            <p className="text-note text-ink-2">
              Figures are in these units unless a column says another. The file is kept; you can leave this
              page and find it again on the list.
            </p>
          </Section>
        </div>
      )}
    </ProgramFrame>
  );
}

/** The sample, or why there is none. */
async function sampleOrWords(sha256: string): Promise<FileSample | string> {
  try {
    return await sampleOf(await openObject(sha256), null);
  } catch (error) {
    if (error instanceof WorkbookRefused) return error.message;
    if (error instanceof CsvFault) return problemSentence(error.problem);
    throw error;
  }
}
