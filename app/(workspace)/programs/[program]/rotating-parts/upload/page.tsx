import { type Metadata } from 'next';
import { rotorRevisionsOf } from '@/db/queries/configurations';
import { RotorUpload } from '@/components/rotors/rotor-upload';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from '../../frame';

export const metadata: Metadata = { title: 'Upload rotating parts' };

/** A file of rotors, or with `?content=points` of operating points. */
export default async function RotorUploadPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/rotating-parts/upload'>) {
  const access = await requireProgram((await params).program, 'rotors.keep');
  const { program } = access;
  const content = (await searchParams)['content'] === 'points' ? 'points' : 'rotors';
  const home = `/programs/${program.code}/rotating-parts`;
  const [newest] = await rotorRevisionsOf(serverDb(), program.id);
  return (
    <ProgramFrame access={access} current="rotating-parts">
      <PageHead
        title={content === 'rotors' ? 'Upload rotors' : 'Upload operating points'}
        above={<TextLink href={home}>Rotating parts</TextLink>}
        lead="A file is taken whole or not at all."
      />
      <ChoiceLinks
        label="The file holds"
        options={[
          { words: 'rotors', href: `${home}/upload`, current: content === 'rotors' },
          { words: 'operating points', href: `${home}/upload?content=points`, current: content === 'points' },
        ]}
      />
      <RotorUpload
        key={content}
        to={`/api/internal/programs/${program.code}/rotors/revisions`}
        content={content}
        base={newest?.number ?? 0}
        backHref={home}
      />
    </ProgramFrame>
  );
}
