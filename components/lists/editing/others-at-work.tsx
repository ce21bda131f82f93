import { counted } from '@/components/lists/list-words';
import { Banner } from '@/components/ui/banner';
import { Day } from '@/components/ui/day';
import { type Presence } from '@/lib/contracts/list-draft';

/** Colleagues who have a draft of the same list: who, since when, how much. */
export function OthersAtWork({ others }: Pick<Presence, 'others'>) {
  if (others.length === 0) return null;
  return (
    <Banner severity="note" word="Also here" live>
      {others.map(({ name, base, since, changedAt, rows }) => (
        <p key={`${name} ${since}`}>
          {name} has a draft from revision {base} since <Day at={new Date(since)} time />:{' '}
          {counted(rows, 'row')} changed, last at <Day at={new Date(changedAt)} time />.
        </p>
      ))}
      <p className="text-ink-2">
        Who saves later is merged with who saves first, row by row; what both changed is shown in both
        versions.
      </p>
    </Banner>
  );
}
