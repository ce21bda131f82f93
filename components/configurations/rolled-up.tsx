import { type ConfigurationView, viewHref } from '@/components/configurations/address';
import { ConditionResultView, type ProgramLimits } from '@/components/configurations/condition-result';
import { ConditionTable } from '@/components/configurations/condition-table';
import { GroupTable } from '@/components/configurations/group-table';
import { MomentumByPoint } from '@/components/rotors/momentum-by-point';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { Section } from '@/components/ui/section';
import { type ConfigurationResult } from '@/lib/loading/configuration';
import { OUTPUT_UNITS, UNIT_SYSTEMS } from '@/lib/units/names';

interface RolledUpProps {
  /** Address of the configuration. */
  readonly home: string;
  readonly view: ConfigurationView;
  readonly result: ConfigurationResult;
  readonly limits: ProgramLimits;
}

/** What a roll-up says: the conditions beside each other, one of them in full, the rotors. */
export function RolledUp({ home, view, result, limits }: RolledUpProps) {
  const units = OUTPUT_UNITS[view.units];
  const { conditions, geometry, operatingPoints } = result;
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
          limits={limits}
        />
      </Section>
      <Section title={shown.title}>
        <ConditionResultView
          rollUp={shown.rollUp}
          uncertainty={shown.uncertainty}
          {...{ geometry, limits, units }}
        />
      </Section>
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
