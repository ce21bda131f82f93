import { baselinesOfProgram, submissionsOfProgram } from '@/db/queries/baselines';
import { configurationsOfProgram, rotorRevisionsOf } from '@/db/queries/configurations';
import { listsOfProgram } from '@/db/queries/lists';
import { counted } from '@/components/lists/list-words';
import { StationSummary } from '@/components/programs/station-summary';
import { ButtonLink } from '@/components/ui/button';
import { Day } from '@/components/ui/day';
import { EmptyPlace } from '@/components/ui/empty-place';
import { Section } from '@/components/ui/section';
import { serverDb } from '@/lib/server/database';
import { type ProgramAccess } from '@/lib/server/http/access';

interface HereProps {
  readonly access: ProgramAccess;
}

/** The lists of a program, those with something to do first. */
export async function ListsHere({ access: { program, can } }: HereProps) {
  const home = `/programs/${program.code}/lists`;
  const lists = await listsOfProgram(serverDb(), program.id);
  const lines = lists.map((list) => ({
    href: `${home}/${list.code}`,
    title: list.title,
    facts:
      list.revised_at === null ? (
        'No revision yet'
      ) : (
        <>
          Revision {list.number}, {counted(list.rows ?? 0, 'row')}, <Day at={list.revised_at} />,{' '}
          {list.author}
        </>
      ),
    waits: importWords(list.import_state),
  }));
  return (
    <Section title="Lists">
      {lines.length === 0 ? (
        <EmptyPlace
          title="There is no mass list yet"
          action={can('lists.keep') ? <ButtonLink href={home}>Go to lists</ButtonLink> : null}
        >
          <p>Mass lists hold the components, from one source each, in revisions.</p>
        </EmptyPlace>
      ) : (
        <StationSummary
          lines={[...lines].sort((a, b) => Number(b.waits !== null) - Number(a.waits !== null))}
        />
      )}
    </Section>
  );
}

function importWords(state: string | null): string | null {
  if (state === 'failed') return 'Newest file has problems';
  return state === 'waiting' || state === 'running' ? 'A file is being read' : null;
}

/** The newest revision of the rotating parts. */
export async function RotatingPartsHere({ access: { program, can } }: HereProps) {
  const home = `/programs/${program.code}/rotating-parts`;
  const [newest] = await rotorRevisionsOf(serverDb(), program.id);
  return (
    <Section title="Rotating parts">
      {newest === undefined ? (
        <EmptyPlace
          title="There are no rotating parts yet"
          action={can('rotors.keep') ? <ButtonLink href={home}>Go to rotating parts</ButtonLink> : null}
        >
          <p>Rotors with their spin axes and inertias, and the operating points that set their speeds.</p>
        </EmptyPlace>
      ) : (
        <StationSummary
          lines={[
            {
              href: home,
              title: `Revision ${newest.number}`,
              facts: (
                <>
                  {counted(newest.rotors.length, 'rotor')}, {counted(newest.points.length, 'operating point')}
                  , <Day at={newest.created_at} />, {newest.author}
                </>
              ),
              waits: null,
            },
          ]}
        />
      )}
    </Section>
  );
}

/** The configurations of a program, those without a roll-up of what they now hold first. */
export async function ConfigurationsHere({ access: { program, can } }: HereProps) {
  const home = `/programs/${program.code}/configurations`;
  const configurations = await configurationsOfProgram(serverDb(), program.id);
  const lines = configurations.map((one) => ({
    href: `${home}/${one.code}`,
    title: one.title,
    facts:
      one.rolled_up_at === null ? (
        `${one.build_title}, never rolled up`
      ) : (
        <>
          {one.build_title}, rolled up <Day at={one.rolled_up_at} />
        </>
      ),
    waits: one.rolled_up_version === one.version ? null : 'To roll up',
  }));
  return (
    <Section title="Configurations">
      {lines.length === 0 ? (
        <EmptyPlace
          title="There is no configuration yet"
          action={
            can('configurations.keep') ? <ButtonLink href={home}>Go to configurations</ButtonLink> : null
          }
        >
          <p>A configuration pins list revisions and rotating parts and rolls them up.</p>
        </EmptyPlace>
      ) : (
        <StationSummary
          lines={[...lines].sort((a, b) => Number(b.waits !== null) - Number(a.waits !== null))}
        />
      )}
    </Section>
  );
}

/** What waits for a decision, oldest first, then the newest signed baseline of each build. */
export async function BaselinesHere({ access: { program, can } }: HereProps) {
  const home = `/programs/${program.code}/baselines`;
  const [signed, submissions] = await Promise.all([
    baselinesOfProgram(serverDb(), program.id),
    can('submissions.read') ? submissionsOfProgram(serverDb(), program.id) : [],
  ]);
  const waiting = submissions.filter(({ decision }) => decision === null).reverse();
  const newest = signed.filter(
    (one, at) => signed.findIndex((other) => other.build_id === one.build_id) === at,
  );
  return (
    <Section title="Baselines">
      {waiting.length + newest.length === 0 ? (
        <EmptyPlace title="No baseline has been signed yet">
          <p>
            Weights engineers submit a configuration; a chief engineer signs it. Simulation engineers then
            find it here.
          </p>
        </EmptyPlace>
      ) : (
        <StationSummary
          lines={[
            ...waiting.map((one) => ({
              href: `${home}/submissions/${one.id}`,
              title: one.title,
              facts: (
                <>
                  {one.build_title}, submitted <Day at={one.submitted_at} />, {one.submitter}
                </>
              ),
              waits: 'To decide',
            })),
            ...newest.map((one) => ({
              href: `${home}/${one.number}`,
              title: `Baseline ${one.number}, ${one.title}`,
              facts: (
                <>
                  {one.build_title}, signed <Day at={one.signed_at} />, {one.signer}
                </>
              ),
              waits: one.state === 'withdrawn' ? 'Withdrawn' : null,
            })),
          ]}
        />
      )}
    </Section>
  );
}
