import { type Metadata } from 'next';
import { currentFrameIssue, geometryOf } from '@/db/queries/frames';
import { referencePointsOf } from '@/db/queries/settings';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { ReferencePointForm } from '@/components/settings/reference-point-form';
import { SettingsNav } from '@/components/settings/settings-nav';
import { ButtonLink } from '@/components/ui/button';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead, Section } from '@/components/ui/section';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { askedLength } from '@/lib/units/choice';
import { fromSi } from '@/lib/units/convert';
import { LENGTH_UNITS } from '@/lib/units/table';
import { ProgramFrame } from '../../frame';
import { addReferencePointAction } from '../actions';

export const metadata: Metadata = { title: 'Reference points' };

export default async function ReferencePointsPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/settings/reference-points'>) {
  const access = await requireProgram((await params).program, 'settings.read');
  const { program, can } = access;
  const unit = askedLength((await searchParams)['length']);
  const home = `/programs/${program.code}/settings`;
  const issue = await currentFrameIssue(serverDb(), program.id);
  const points = issue ? await referencePointsOf(serverDb(), issue.id) : [];
  const axes = issue ? geometryOf(issue).axes : null;
  const decimals = sharedDecimals(points.flatMap(({ place }) => place.map((value) => fromSi(value, unit))));
  return (
    <ProgramFrame access={access}>
      <PageHead
        title="Reference points"
        lead={
          issue
            ? `Named points of frame issue ${issue.number}, from its datum. They leave with every baseline.`
            : 'Named points of the airframe frame.'
        }
      />
      <SettingsNav program={program.code} current="/reference-points" />
      {issue === undefined ? (
        <EmptyPlace
          title="There is no frame issue yet"
          action={can('frame.keep') ? <ButtonLink href={home}>Go to the airframe frame</ButtonLink> : null}
        >
          <p>Reference points lie in the airframe frame, so that comes first.</p>
        </EmptyPlace>
      ) : null}
      {axes === null ? null : (
        <Section
          title={`${points.length} points`}
          aside={
            <ChoiceLinks
              label="Lengths in"
              options={LENGTH_UNITS.map((each) => ({
                words: each,
                href: `${home}/reference-points?length=${each}`,
                current: each === unit,
              }))}
            />
          }
        >
          {points.length === 0 ? (
            <EmptyPlace title="No point is named yet">
              <p>
                The moment reference centre of the aerodynamic data belongs here first; then wheels, jacks,
                thrust lines, wherever forces act.
              </p>
            </EmptyPlace>
          ) : (
            <Table caption={`Reference points in airframe axes: x ${axes[0]}, y ${axes[1]}, z ${axes[2]}`}>
              <thead>
                <tr>
                  <ColumnHead>Code</ColumnHead>
                  <ColumnHead>Title</ColumnHead>
                  {(['x', 'y', 'z'] as const).map((letter) => (
                    <ColumnHead key={letter} side="right" unit={unit}>
                      {letter}
                    </ColumnHead>
                  ))}
                </tr>
              </thead>
              <tbody>
                {points.map((point) => (
                  <tr key={point.code}>
                    <RowHead>
                      <code>{point.code}</code>
                    </RowHead>
                    <Cell>{point.title}</Cell>
                    {point.place.map((value, index) => (
                      <Cell key={index} side="right">
                        <Num value={value} unit={unit} decimals={decimals} />
                      </Cell>
                    ))}
                  </tr>
                ))}
              </tbody>
            </Table>
          )}
        </Section>
      )}
      {axes !== null && can('reference-points.keep') ? (
        <Section
          title="Add a point"
          lead="A point of an issue is not altered: when one moves, issue the frame again."
        >
          <ReferencePointForm
            key={unit}
            action={addReferencePointAction}
            program={program.code}
            axes={axes}
            unit={unit}
          />
        </Section>
      ) : null}
    </ProgramFrame>
  );
}
