import { type ConfigurationView, viewHref } from '@/components/configurations/address';
import { ConditionResultView } from '@/components/configurations/condition-result';
import { ConditionTable } from '@/components/configurations/condition-table';
import { GroupTable } from '@/components/configurations/group-table';
import { programLimits } from '@/components/configurations/program-limits';
import { viewsAsked, viewsHref } from '@/components/three-views/views-address';
import { StandingTable } from '@/components/limits/standing-table';
import { MaturitySection } from '@/components/mass/maturity-section';
import { MomentumByPoint } from '@/components/rotors/momentum-by-point';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { Section } from '@/components/ui/section';
import { type ConfigurationResult, standingsOf } from '@/lib/loading/configuration';
import { type Limit } from '@/lib/loading/limits';
import { OUTPUT_UNITS, UNIT_SYSTEMS } from '@/lib/units/names';

interface RolledUpProps {
  /** Address of the configuration. */
  readonly home: string;
  readonly view: ConfigurationView;
  readonly result: ConfigurationResult;
  /** Those in force today, for results that were stored before theirs were kept. */
  readonly limitsToday: readonly Limit[];
}

/** What a roll-up says: the conditions beside each other, one of them in full, the rotors. */
export function RolledUp({ home, view, result, limitsToday }: RolledUpProps) {
  const units = OUTPUT_UNITS[view.units];
  const { conditions, geometry, operatingPoints, allowances } = result;
  const limits = result.limits ?? limitsToday;
  const standings = standingsOf({ ...result, limits });
  const shown = conditions.find(({ code }) => code === view.condition) ?? conditions[0];
  const to = (changes: Partial<ConfigurationView>) => viewHref(home, { ...view, ...changes });
  if (shown === undefined) return null;
  return (
    <div className="grid min-w-0 gap-8">
      <Section
        title="Conditions"
        aside={
          <ChoiceLinks
            label="Units"
            options={UNIT_SYSTEMS.map((system) => ({
              words: system === 'si' ? 'SI' : 'US',
              href: to({ units: system }),
              current: system === view.units,
            }))}
          />
        }
      >
        <ConditionTable
          conditions={conditions.map((condition) => ({
            ...condition,
            href: to({ condition: condition.code }),
          }))}
          shown={shown.code}
          units={units}
          limitsOf={(code) => programLimits(limits, code)}
        />
      </Section>
      <Section title={shown.title}>
        <ConditionResultView
          rollUp={shown.rollUp}
          uncertainty={shown.uncertainty}
          limits={programLimits(limits, shown.code)}
          {...{ geometry, units }}
        />
      </Section>
      <Section
        title="Limits and targets"
        lead={
          result.limits === undefined
            ? 'Those of today: this was rolled up before they were kept with it.'
            : null
        }
      >
        <StandingTable
          standings={standings}
          units={units}
          rowsHref={(condition, group) =>
            viewsHref(`${home}/views`, viewsAsked({ condition, within: group }))
          }
        />
      </Section>
      <MaturitySection condition={shown} unit={units.mass} {...{ geometry, allowances }} />
      <Section
        title="Groups"
        aside={
          <ChoiceLinks
            label="Levels"
            options={[
              { words: 'first', href: to({ allGroups: false }), current: !view.allGroups },
              { words: 'all', href: to({ allGroups: true }), current: view.allGroups },
            ]}
          />
        }
      >
        <GroupTable rollUp={shown.rollUp} geometry={geometry} units={units} all={view.allGroups} />
      </Section>
      <Section
        title="Angular momentum"
        lead="Of the rotating parts relative to the airframe. The tensor above counts them as if they were locked."
      >
        {operatingPoints.length === 0 ? (
          <p className="text-ink-2">No operating point gives every shaft a speed.</p>
        ) : (
          <MomentumByPoint
            points={operatingPoints.map((point) => ({ ...point, href: to({ point: point.code }) }))}
            asked={view.point}
            unit={units.angularMomentum}
            stacked
          />
        )}
      </Section>
    </div>
  );
}
