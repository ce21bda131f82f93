import { numberText } from '@/components/drivers/number-words';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { BY, type By, type DriversAsked } from '@/lib/drivers/drivers';
import { TEN } from '@/lib/mass/contributions/ten';

const BY_WORDS: Readonly<Record<By, string>> = {
  rows: 'rows',
  groups: 'groups',
  branches: 'first-level groups',
};

/** Which of the ten numbers is looked into, and what its parts are; each choice has its own address. */
export function DriverChoices({
  asked,
  hrefOf,
}: {
  readonly asked: DriversAsked;
  readonly hrefOf: (asked: DriversAsked) => string;
}) {
  return (
    <div className="flex flex-wrap gap-x-8 gap-y-2">
      <ChoiceLinks
        label="Of"
        options={TEN.map((number) => ({
          words: numberText(number),
          href: hrefOf({ ...asked, number }),
          current: number === asked.number,
        }))}
      />
      <ChoiceLinks
        label="By"
        options={BY.map((by) => ({
          words: BY_WORDS[by],
          href: hrefOf({ ...asked, by }),
          current: by === asked.by,
        }))}
      />
    </div>
  );
}
