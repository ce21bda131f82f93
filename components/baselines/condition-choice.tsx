import { pathWith } from '@/components/baselines/paths';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { UNIT_SYSTEMS, type UnitSystem } from '@/lib/units/names';

interface ConditionChoiceProps {
  /** The page without its query. */
  readonly path: string;
  /** What else the query keeps. */
  readonly keep?: Readonly<Record<string, string | number | null>>;
  readonly conditions: readonly { readonly code: string; readonly title: string }[];
  readonly current: string | null;
  readonly system: UnitSystem;
}

const SYSTEM_WORDS: Readonly<Record<UnitSystem, string>> = { si: 'SI', us: 'lb, in, slug·ft²' };

/** Which condition a page shows, and in which units; each choice has its own address. */
export function ConditionChoice({ path, keep = {}, conditions, current, system }: ConditionChoiceProps) {
  const units = (of: UnitSystem) => (of === 'si' ? null : of);
  return (
    <div className="no-print flex flex-wrap gap-x-8 gap-y-1">
      {conditions.length > 1 ? (
        <ChoiceLinks
          label="Condition"
          options={conditions.map(({ code, title }) => ({
            href: pathWith(path, { ...keep, condition: code, units: units(system) }),
            words: title,
            current: code === current,
          }))}
        />
      ) : null}
      <ChoiceLinks
        label="Units"
        options={UNIT_SYSTEMS.map((of) => ({
          href: pathWith(path, { ...keep, condition: current, units: units(of) }),
          words: SYSTEM_WORDS[of],
          current: of === system,
        }))}
      />
    </div>
  );
}
