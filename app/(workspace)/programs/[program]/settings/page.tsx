import { type Metadata } from 'next';
import { geometryOf } from '@/db/queries/frames';
import { programFrames } from '@/db/queries/program-frames';
import { frameIssuesOf } from '@/db/queries/settings';
import { FormerForm } from '@/components/settings/former-form';
import { FrameChange } from '@/components/settings/frame-change';
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
import { stateFormerFrameAction } from './actions';

export const metadata: Metadata = { title: 'Airframe frame' };

/** The airframe frame in force, or the issue that the address names, and the issues there were. */
export default async function FramePage({ params, searchParams }: PageProps<'/programs/[program]/settings'>) {
  const access = await requireProgram((await params).program, 'settings.read');
  const { program, can } = access;
  const asked = await searchParams;
  const unit = askedLength(asked['length']);
  const home = `/programs/${program.code}/settings`;
  const [issues, frames] = await Promise.all([
    frameIssuesOf(serverDb(), program.id),
    programFrames(serverDb(), program.id),
  ]);
  const newest = issues[0];
  const shown = issues.find((issue) => String(issue.number) === asked['issue']) ?? newest;
  const before = issues.find(({ number }) => number === (shown?.number ?? 0) - 1);
  const conversion = shown && before ? frames.between(before.id, shown.id) : null;
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
          {before === undefined ? null : (
            <Section title={`Against issue ${before.number}`}>
              {conversion === null ? (
                <>
                  <p className="measure">
                    Issue {shown.number} was made without saying how issue {before.number} lies in it. Until
                    that is said, nothing is converted between them.
                  </p>
                  {can('frame.keep') ? (
                    <FormerForm
                      key={unit}
                      action={stateFormerFrameAction}
                      program={program.code}
                      number={shown.number}
                      geometry={frames.geometry(shown.id)}
                      former={{
                        number: before.number,
                        geometry: frames.geometry(before.id),
                        example: { item: 'LEMAC', place: frames.geometry(before.id).lemac },
                      }}
                      unit={unit}
                    />
                  ) : null}
                </>
              ) : (
                <FrameChange conversion={conversion} former={before.number} unit={unit} />
              )}
            </Section>
          )}
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
