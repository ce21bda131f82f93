import { type Metadata } from 'next';
import { buildsOf } from '@/db/queries/settings';
import { BuildForm } from '@/components/settings/build-form';
import { SettingsNav } from '@/components/settings/settings-nav';
import { BUILD_WORDS } from '@/components/settings/words';
import { Day } from '@/components/ui/day';
import { PageHead, Section } from '@/components/ui/section';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { ProgramFrame } from '../../frame';
import { addBuildAction } from '../actions';

export const metadata: Metadata = { title: 'Builds' };

export default async function BuildsPage({ params }: PageProps<'/programs/[program]/settings/builds'>) {
  const access = await requireProgram((await params).program, 'settings.read');
  const { program, can } = access;
  const builds = await buildsOf(serverDb(), program.id);
  return (
    <ProgramFrame access={access}>
      <PageHead
        title="Builds"
        lead="What a line of baselines is about: the design, or aircraft as built or as weighed. Each has its own current baseline."
      />
      <SettingsNav program={program.code} current="/builds" />
      <Table caption="Builds" captionHidden>
        <thead>
          <tr>
            <ColumnHead>Title</ColumnHead>
            <ColumnHead>Code</ColumnHead>
            <ColumnHead>About</ColumnHead>
            <ColumnHead>Serial numbers</ColumnHead>
            <ColumnHead>Default</ColumnHead>
            <ColumnHead>Added by</ColumnHead>
            <ColumnHead>On</ColumnHead>
          </tr>
        </thead>
        <tbody>
          {builds.map((build) => (
            <tr key={build.code}>
              <RowHead>{build.title}</RowHead>
              <Cell>
                <code>{build.code}</code>
              </Cell>
              <Cell>{BUILD_WORDS[build.kind]}</Cell>
              <Cell className="num">{serialWords(build.serial_from, build.serial_to)}</Cell>
              <Cell>{build.is_default ? 'Default' : ''}</Cell>
              <Cell>{build.author}</Cell>
              <Cell>
                <Day at={build.created_at} />
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
      {can('builds.keep') ? (
        <Section title="Add a build">
          <BuildForm action={addBuildAction} program={program.code} />
        </Section>
      ) : null}
    </ProgramFrame>
  );
}

function serialWords(from: number | null, to: number | null): string {
  if (from === null) return '–';
  if (to === null) return `${from} and on`;
  return from === to ? String(from) : `${from} to ${to}`;
}
