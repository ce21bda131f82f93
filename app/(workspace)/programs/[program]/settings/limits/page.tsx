import { type Metadata } from 'next';
import { allowancesOf } from '@/db/queries/configurations';
import {
  conditionCodesOf,
  groupBreakdownOf,
  groupsInLists,
  growthAllowancesOf,
  limitsOf,
  today,
} from '@/db/queries/settings';
import { AllowanceTable } from '@/components/settings/allowance-table';
import { LimitForm } from '@/components/settings/limit-form';
import { LimitTable } from '@/components/settings/limit-table';
import { SettingsNav } from '@/components/settings/settings-nav';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { DialogButton } from '@/components/ui/dialog-button';
import { PageHead, Section } from '@/components/ui/section';
import { groupChoices } from '@/lib/groups/choices';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { askedSystem } from '@/lib/units/choice';
import { OUTPUT_UNITS, UNIT_SYSTEMS } from '@/lib/units/names';
import { ProgramFrame } from '../../frame';
import { removeAllowanceAction, removeLimitAction, setAllowanceAction, setLimitAction } from '../actions';

export const metadata: Metadata = { title: 'Limits and growth' };

export default async function LimitsPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/settings/limits'>) {
  const access = await requireProgram((await params).program, 'settings.read');
  const { program, can } = access;
  const system = askedSystem((await searchParams)['units']);
  const units = OUTPUT_UNITS[system];
  const db = serverDb();
  const [limits, rules, allowances, breakdown, inLists, conditions, day] = await Promise.all([
    limitsOf(db, program.id),
    growthAllowancesOf(db, program.id),
    allowancesOf(db, program.id),
    groupBreakdownOf(db, program.id),
    groupsInLists(db, program.id),
    conditionCodesOf(db, program.id),
    today(db),
  ]);
  const ruled = rules.map((rule) => ({ ...rule, group: breakdown.present(rule.group_path) }));
  const groups = groupChoices(breakdown, [
    ...inLists.map(({ group }) => group),
    ...ruled.flatMap(({ group }) => (group === '' ? [] : [group])),
    ...limits.flatMap(({ group }) => (group === '' ? [] : [group])),
  ]);
  const choices = { groups, conditions };
  return (
    <ProgramFrame access={access}>
      <PageHead
        title="Limits and growth"
        lead="What results are judged by, and how much mass is expected to grow."
      />
      <SettingsNav program={program.code} current="/limits" />
      <Section
        title="Limits and targets"
        aside={
          <ChoiceLinks
            label="Units"
            options={UNIT_SYSTEMS.map((one) => ({
              words: one === 'si' ? 'SI' : 'US',
              href: `/programs/${program.code}/settings/limits?units=${one}`,
              current: one === system,
            }))}
          />
        }
        lead="Basic and predicted figures are held against them at every roll-up and again at a submission. Beyond a contract or specification is a warning that the submitter answers; beyond a target or an allocation is a note. None stops a submission: a figure beyond its limit is a fact about the aircraft. Those in force when a configuration is submitted stay with its baseline."
      >
        <LimitTable
          key={system}
          limits={limits.map((limit) => ({ ...limit, group: breakdown.present(limit.group) }))}
          program={program.code}
          {...{ day, units, choices }}
          actions={can('limits.keep') ? { set: setLimitAction, remove: removeLimitAction } : null}
        />
        {can('limits.keep') ? (
          <div>
            <DialogButton words="State a limit" title="State a limit or target">
              <LimitForm
                action={setLimitAction}
                program={program.code}
                choices={choices}
                present={{ from: day }}
              />
            </DialogButton>
          </div>
        ) : null}
      </Section>
      <Section
        title="Growth allowances"
        lead="For rows that state no growth of their own. The nearest group up a row’s path that states one for its maturity gives it, then the program’s own. Basic results are without growth, predicted results with it."
      >
        <AllowanceTable
          allowances={allowances}
          rules={ruled}
          groups={groups}
          program={program.code}
          actions={can('allowances.keep') ? { set: setAllowanceAction, remove: removeAllowanceAction } : null}
        />
      </Section>
    </ProgramFrame>
  );
}
