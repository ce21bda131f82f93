import { type Metadata } from 'next';
import { notFound } from 'next/navigation';
import { conditionsOf, findConfiguration } from '@/db/queries/configurations';
import { findFrameIssue, geometryOf } from '@/db/queries/frames';
import { ConditionForm } from '@/components/configurations/condition-form';
import { ConditionList } from '@/components/configurations/condition-list';
import { ButtonLink } from '@/components/ui/button';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { askedLength, askedMass } from '@/lib/units/choice';
import { asTyped } from '@/lib/units/convert';
import { LENGTH_UNITS, MASS_UNITS } from '@/lib/units/table';
import { ProgramFrame } from '../../../frame';
import { removeConditionAction, saveConditionAction } from '../../actions';

export const metadata: Metadata = { title: 'Conditions' };

/** The conditions of a configuration; `?edit=CODE` opens one, `?edit=` a new one. */
export default async function ConditionsPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/configurations/[configuration]/conditions'>) {
  const { configuration: code, program: programCode } = await params;
  const access = await requireProgram(programCode, 'configurations.keep');
  const { program } = access;
  const db = serverDb();
  const configuration = await findConfiguration(db, program.id, code);
  if (configuration === undefined) notFound();
  const [conditions, issue] = await Promise.all([
    conditionsOf(db, configuration.id),
    findFrameIssue(db, configuration.frame_issue_id),
  ]);
  const asked = await searchParams;
  const [massUnit, lengthUnit] = [askedMass(asked['mass']), askedLength(asked['length'])];
  const edit = typeof asked['edit'] === 'string' ? asked['edit'] : null;
  const edited = conditions.find((condition) => condition.code === edit) ?? null;
  if (edit !== null && edit !== '' && edited === null) notFound();
  const home = `/programs/${program.code}/configurations/${configuration.code}`;
  const here = `${home}/conditions`;
  const at = (query: Record<string, string>) =>
    `${here}?${new URLSearchParams({ edit: edit ?? '', mass: massUnit, length: lengthUnit, ...query }).toString()}`;
  const fields = {
    program: program.code,
    configuration: configuration.code,
    version: String(configuration.version),
  };
  return (
    <ProgramFrame access={access} current="configurations">
      <PageHead
        title="Conditions"
        above={<TextLink href={home}>{configuration.title}</TextLink>}
        lead="A condition is one loading: which rows of the lists are on board, and named items with their masses and places."
        actions={edit === null ? <ButtonLink href={`${here}?edit=`}>Add condition</ButtonLink> : null}
      />
      <ConditionList conditions={conditions} here={here} remove={{ action: removeConditionAction, fields }} />
      {edit === null ? null : (
        <Section
          title={edited === null ? 'New condition' : edited.title}
          aside={
            <span className="flex flex-wrap gap-x-6">
              <ChoiceLinks
                label="Masses in"
                options={MASS_UNITS.map((unit) => ({
                  words: unit,
                  href: at({ mass: unit }),
                  current: unit === massUnit,
                }))}
              />
              <ChoiceLinks
                label="Lengths in"
                options={LENGTH_UNITS.map((unit) => ({
                  words: unit,
                  href: at({ length: unit }),
                  current: unit === lengthUnit,
                }))}
              />
            </span>
          }
        >
          <ConditionForm
            key={`${edit} ${massUnit} ${lengthUnit}`}
            action={saveConditionAction}
            fields={fields}
            condition={
              edited && {
                ...edited,
                items: edited.items.map(({ name, category, mass, place }) => ({
                  name,
                  category,
                  mass: String(asTyped(mass, massUnit)),
                  x: String(asTyped(place[0] ?? 0, lengthUnit)),
                  y: String(asTyped(place[1] ?? 0, lengthUnit)),
                  z: String(asTyped(place[2] ?? 0, lengthUnit)),
                })),
              }
            }
            axes={geometryOf(issue).axes}
            massUnit={massUnit}
            lengthUnit={lengthUnit}
            backHref={here}
          />
        </Section>
      )}
    </ProgramFrame>
  );
}
