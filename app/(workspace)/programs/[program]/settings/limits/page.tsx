import { type Metadata } from 'next';
import { growthAllowancesOf, limitsOf } from '@/db/queries/settings';
import { AllowanceTable } from '@/components/settings/allowance-table';
import { LimitTable } from '@/components/settings/limit-table';
import { SettingsNav } from '@/components/settings/settings-nav';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { PageHead, Section } from '@/components/ui/section';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { askedMass } from '@/lib/units/choice';
import { MASS_UNITS } from '@/lib/units/table';
import { ProgramFrame } from '../../frame';
import { removeLimitAction, setAllowanceAction, setLimitAction } from '../actions';

export const metadata: Metadata = { title: 'Limits and growth' };

export default async function LimitsPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/settings/limits'>) {
  const access = await requireProgram((await params).program, 'settings.read');
  const { program, can } = access;
  const massUnit = askedMass((await searchParams)['mass']);
  const [limits, allowances] = await Promise.all([
    limitsOf(serverDb(), program.id),
    growthAllowancesOf(serverDb(), program.id),
  ]);
  return (
    <ProgramFrame access={access}>
      <PageHead
        title="Limits and growth"
        lead="What results are judged by, and how much mass is expected to grow."
      />
      <SettingsNav program={program.code} current="/limits" />
      <Section
        title="Limits"
        aside={
          <ChoiceLinks
            label="Masses in"
            options={MASS_UNITS.map((unit) => ({
              words: unit,
              href: `/programs/${program.code}/settings/limits?mass=${unit}`,
              current: unit === massUnit,
            }))}
          />
        }
      >
        <LimitTable
          key={massUnit}
          limits={limits}
          program={program.code}
          massUnit={massUnit}
          actions={can('limits.keep') ? { set: setLimitAction, remove: removeLimitAction } : null}
        />
      </Section>
      <Section
        title="Growth allowances"
        lead="For rows that state no growth of their own, by their maturity. Basic results are without growth, predicted results with it."
      >
        <AllowanceTable
          allowances={allowances}
          program={program.code}
          action={can('allowances.keep') ? setAllowanceAction : null}
        />
      </Section>
    </ProgramFrame>
  );
}
