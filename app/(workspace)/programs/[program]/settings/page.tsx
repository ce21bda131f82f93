import { type Metadata } from 'next';
import { geometryOf } from '@/db/queries/frames';
import { frameIssuesOf } from '@/db/queries/settings';
import { FrameFacts } from '@/components/settings/frame-facts';
import { FrameIssueTable } from '@/components/settings/frame-issue-table';
import { SettingsNav } from '@/components/settings/settings-nav';
import { ButtonLink } from '@/components/ui/button';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { askedLength } from '@/lib/units/choice';
import { LENGTH_UNITS } from '@/lib/units/table';
import { ProgramFrame } from '../frame';

export const metadata: Metadata = { title: 'Airframe frame' };

/** The airframe frame in force, or the issue that the address names, and the issues there were. */
export default async function FramePage({ params, searchParams }: PageProps<'/programs/[program]/settings'>) {
  const access = await requireProgram((await params).program, 'settings.read');
  const { program, can } = access;
  const asked = await searchParams;
  const unit = askedLength(asked['length']);
  const home = `/programs/${program.code}/settings`;
  const issues = await frameIssuesOf(serverDb(), program.id);
  const newest = issues[0];
  const shown = issues.find((issue) => String(issue.number) === asked['issue']) ?? newest;
  const at = (number: number, length: string) =>
    `${home}?${new URLSearchParams({ ...(number === newest?.number ? {} : { issue: String(number) }), length })}`;
  return (
    <ProgramFrame access={access}>
      <PageHead
        title="Airframe frame"
        lead="Every list, reference point and result refers to an issue of this frame."
        actions={
          newest && can('frame.keep') ? (
            <ButtonLink
              href={`${home}/frame-issue?length=${unit}`}
            >{`Issue frame ${newest.number + 1}`}</ButtonLink>
          ) : null
        }
      />
      <SettingsNav program={program.code} current="" />
      {shown === undefined ? (
        <EmptyPlace
          title="There is no frame issue yet"
          action={
            can('frame.keep') ? (
              <ButtonLink kind="primary" href={`${home}/frame-issue`}>
                Issue the airframe frame
              </ButtonLink>
            ) : null
          }
        >
          <p>
            Here belong the directions of the axes, the mean chord with its leading edge, span and length.
            Lists can be made once they are known.
          </p>
          {can('frame.keep') ? null : <p>A chief engineer issues the frame.</p>}
        </EmptyPlace>
      ) : (
        <>
          <Section
            title={shown === newest ? `Issue ${shown.number}, in force` : `Issue ${shown.number}, replaced`}
            aside={
              <ChoiceLinks
                label="Lengths in"
                options={LENGTH_UNITS.map((each) => ({
                  words: each,
                  href: at(shown.number, each),
                  current: each === unit,
                }))}
              />
            }
          >
            <FrameFacts issue={shown} geometry={geometryOf(shown)} unit={unit} />
          </Section>
          <Section title="Issues">
            <FrameIssueTable
              issues={issues.map((issue) => ({
                ...issue,
                href: at(issue.number, unit),
                shown: issue === shown,
              }))}
            />
          </Section>
        </>
      )}
    </ProgramFrame>
  );
}
