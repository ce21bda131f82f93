import { type Metadata } from 'next';
import { notFound } from 'next/navigation';
import { rotorRevisionsOf } from '@/db/queries/configurations';
import { currentFrameIssue, findFrameIssue, geometryOf } from '@/db/queries/frames';
import { shaftsOf } from '@/components/rotors/points-edits';
import { RotorForm } from '@/components/rotors/rotor-form';
import { RotorRemoval } from '@/components/rotors/rotor-removal';
import { Caution } from '@/components/ui/caution';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { textsOfRotor } from '@/lib/ingest/one-rotor';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { askedSystem } from '@/lib/units/choice';
import { OUTPUT_UNITS } from '@/lib/units/names';
import { ProgramFrame } from '../../frame';
import { removeRotorAction, saveRotorAction } from '../actions';

export const metadata: Metadata = { title: 'Rotor' };

/** One rotor of the newest revision, `?rotor=NAME`, or without it a new one. */
export default async function RotorPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/rotating-parts/rotor'>) {
  const access = await requireProgram((await params).program, 'rotors.keep');
  const { program } = access;
  const asked = await searchParams;
  const home = `/programs/${program.code}/rotating-parts`;
  const db = serverDb();
  const [newest] = await rotorRevisionsOf(db, program.id);
  // A change is laid over the newest revision, and so stated in the frame issue of that one.
  const issue = newest?.frame_issue_id
    ? await findFrameIssue(db, newest.frame_issue_id)
    : await currentFrameIssue(db, program.id);
  const rotors = newest?.rotors ?? [];
  const points = newest?.points ?? [];
  const name = typeof asked['rotor'] === 'string' ? asked['rotor'] : null;
  const rotor = rotors.find((one) => one.rotor === name) ?? null;
  if (name !== null && rotor === null) notFound();
  const unit = OUTPUT_UNITS[askedSystem(asked['units'])].inertia;
  const base = newest?.number ?? 0;
  return (
    <ProgramFrame access={access} current="rotating-parts">
      <PageHead
        title={rotor === null ? 'New rotor' : rotor.rotor}
        above={<TextLink href={home}>Rotating parts</TextLink>}
        lead={
          base === 0
            ? 'Saving makes revision 1 of the rotating parts.'
            : `Laid over revision ${base}; saving makes revision ${base + 1}.`
        }
      />
      {issue === undefined ? (
        <EmptyPlace title="The airframe frame comes first">
          <p>
            Shafts are given in airframe axes: state the{' '}
            <TextLink href={`/programs/${program.code}/settings`}>airframe frame</TextLink> first.
          </p>
        </EmptyPlace>
      ) : (
        <RotorForm
          key={name ?? ''}
          action={saveRotorAction}
          program={program.code}
          base={base}
          was={rotor?.rotor ?? null}
          texts={rotor === null ? {} : textsOfRotor(rotor, unit)}
          unit={unit}
          others={rotors.flatMap((one) => (one === rotor ? [] : [one.rotor]))}
          shafts={shaftsOf(rotors, points)}
          points={points}
          geometry={geometryOf(issue)}
          backHref={home}
        />
      )}
      {rotor === null ? null : (
        <Section title="Remove it">
          <RotorRemoval action={removeRotorAction} program={program.code} base={base} rotor={rotor.rotor} />
        </Section>
      )}
      <Caution />
    </ProgramFrame>
  );
}
