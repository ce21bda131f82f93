import { type Metadata } from 'next';
import { rotorRevisionsOf } from '@/db/queries/configurations';
import { currentFrameIssue, geometryOf } from '@/db/queries/frames';
import { FindingLines } from '@/components/findings/finding-lines';
import { MomentumByPoint } from '@/components/rotors/momentum-by-point';
import { shaftsOf } from '@/components/rotors/points-edits';
import { PointsGrid, PointsTable } from '@/components/rotors/points-grid';
import { RotorRevisions } from '@/components/rotors/rotor-revisions';
import { RotorTable } from '@/components/rotors/rotor-table';
import { Banner } from '@/components/ui/banner';
import { ButtonLink } from '@/components/ui/button';
import { Caution } from '@/components/ui/caution';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { angularMomentum, shaftsWithoutSpeed } from '@/lib/rotors/momentum';
import { momentumUncertainty } from '@/lib/rotors/uncertainty';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { askedSystem } from '@/lib/units/choice';
import { OUTPUT_UNITS, UNIT_SYSTEMS } from '@/lib/units/names';
import { ProgramFrame } from '../frame';
import { savePointsAction } from './actions';

export const metadata: Metadata = { title: 'Rotating parts' };

/** The rotors, the operating points that set their speeds, and the angular momentum that follows. */
export default async function RotatingPartsPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/rotating-parts'>) {
  const access = await requireProgram((await params).program, 'rotors.read');
  const { program, can } = access;
  const asked = await searchParams;
  const home = `/programs/${program.code}/rotating-parts`;
  const [revisions, issue] = await Promise.all([
    rotorRevisionsOf(serverDb(), program.id),
    currentFrameIssue(serverDb(), program.id),
  ]);
  const newest = revisions[0];
  const shown = revisions.find(({ number }) => String(number) === asked['revision']) ?? newest;
  if (issue === undefined || newest === undefined || shown === undefined)
    return (
      <ProgramFrame access={access} current="rotating-parts">
        <PageHead title="Rotating parts" />
        <NothingYet
          home={home}
          settings={`/programs/${program.code}/settings`}
          framed={issue !== undefined}
          keeps={can('rotors.keep')}
        />
      </ProgramFrame>
    );
  const system = askedSystem(asked['units']);
  const units = OUTPUT_UNITS[system];
  const at = (changes: Record<string, string | null>): string => {
    const query = new URLSearchParams();
    const now = {
      revision: shown === newest ? null : String(shown.number),
      point: asked['point'],
      units: system,
    };
    for (const [name, value] of Object.entries({ ...now, ...changes }))
      if (typeof value === 'string' && value !== 'si') query.set(name, value);
    return query.size === 0 ? home : `${home}?${query.toString()}`;
  };
  const geometry = geometryOf(issue);
  const { rotors, points } = shown;
  const shafts = shaftsOf(rotors, points);
  const editable = can('rotors.keep') && shown === newest;
  return (
    <ProgramFrame access={access} current="rotating-parts">
      <PageHead
        title="Rotating parts"
        lead={`Revision ${shown.number}: ${shown.reason}`}
        actions={
          can('rotors.keep') ? (
            <>
              <ButtonLink href={`${home}/rotor`}>Add a rotor</ButtonLink>
              <ButtonLink href={`${home}/upload`}>Upload rotors</ButtonLink>
              <ButtonLink href={`${home}/upload?content=points`}>Upload operating points</ButtonLink>
            </>
          ) : null
        }
      />
      {shown === newest ? null : (
        <Banner severity="note" title={`Revision ${newest.number} is the newest.`}>
          <p>
            What is shown stood before it.{' '}
            <TextLink href={at({ revision: null })}>See the newest revision</TextLink>
          </p>
        </Banner>
      )}
      <Section
        title="Rotors"
        aside={
          <ChoiceLinks
            label="Units"
            options={UNIT_SYSTEMS.map((each) => ({
              words: each === 'si' ? 'SI' : 'US',
              href: at({ units: each }),
              current: each === system,
            }))}
          />
        }
        lead="The tensor of the airframe counts each rotor as if it were locked to it; the angular momentum is what comes on top."
      >
        <RotorTable
          rotors={rotors}
          geometry={geometry}
          unit={units.inertia}
          program={program.code}
          editHref={editable ? `${home}/rotor` : null}
        />
      </Section>
      <Section title="Operating points" lead="Speeds are given per shaft; a rotor turns by its gear ratio.">
        {editable ? (
          <PointsGrid
            action={savePointsAction}
            program={program.code}
            base={newest.number}
            shafts={shafts}
            points={points}
          />
        ) : points.length > 0 ? (
          <PointsTable shafts={shafts} points={points} />
        ) : (
          <p className="text-ink-2">There is no operating point yet.</p>
        )}
      </Section>
      {points.length === 0 ? null : (
        <Section
          title="Angular momentum"
          aside={
            <span>
              Frame issue <span className="num">{issue.number}</span>
            </span>
          }
        >
          <MomentumByPoint
            points={points.map((point) => ({
              code: point.code,
              title: point.title,
              momentum:
                shaftsWithoutSpeed(rotors, point).length > 0
                  ? null
                  : angularMomentum(rotors, point, geometry),
              uncertainty:
                shaftsWithoutSpeed(rotors, point).length > 0
                  ? null
                  : momentumUncertainty(rotors, point, geometry),
              href: at({ point: point.code }),
            }))}
            asked={typeof asked['point'] === 'string' ? asked['point'] : null}
            unit={units.angularMomentum}
          />
        </Section>
      )}
      <Section title="Findings">
        <FindingLines findings={shown.findings.map((finding) => ({ ...finding, seen: null, href: null }))} />
      </Section>
      <Section title="Revisions">
        <RotorRevisions
          revisions={revisions.map((one) => ({
            ...one,
            href: at({ revision: one === newest ? null : String(one.number) }),
          }))}
          shown={shown.number}
        />
      </Section>
      <Caution />
    </ProgramFrame>
  );
}

function NothingYet({
  home,
  settings,
  framed,
  keeps,
}: {
  readonly home: string;
  readonly settings: string;
  readonly framed: boolean;
  readonly keeps: boolean;
}) {
  return (
    <EmptyPlace
      title="There are no rotating parts yet"
      action={
        keeps && framed ? (
          <>
            <ButtonLink kind="primary" href={`${home}/upload`}>
              Upload rotors
            </ButtonLink>
            <ButtonLink href={`${home}/rotor`}>Add a rotor</ButtonLink>
          </>
        ) : null
      }
    >
      <p>
        Propellers, spools, wheels of gears: everything that spins, with its polar inertia, the axis of its
        shaft and the sense of its turn. Then the operating points, which give every shaft its speed.
      </p>
      {framed ? null : (
        <p>
          Shafts are given in airframe axes, so the <TextLink href={settings}>airframe frame</TextLink> comes
          first.
        </p>
      )}
    </EmptyPlace>
  );
}
