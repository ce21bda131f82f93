'use client';

import { useQuery } from '@tanstack/react-query';
import { z } from 'zod';
import { ask } from '@/components/lists/ask';
import { countWords } from '@/components/lists/list-words';
import { Button } from '@/components/ui/button';
import { TextLink } from '@/components/ui/text-link';

const countsSchema = z.object({ added: z.number(), removed: z.number(), changed: z.number() });

interface ChangeCountsProps {
  readonly from: string;
  /** The page that names the changes. */
  readonly href: string;
}

/** How many rows a revision adds, removes and changes, compared when it is asked for. */
export function ChangeCounts({ from, href }: ChangeCountsProps) {
  const { data, error, refetch } = useQuery({
    queryKey: ['changes', from],
    queryFn: ({ signal }) => ask(from, countsSchema, { signal }),
    staleTime: Infinity,
  });
  if (error !== null) {
    return (
      <span>
        Not compared: {error.message}{' '}
        <Button kind="quiet" onClick={() => void refetch()}>
          Try again
        </Button>
      </span>
    );
  }
  if (data === undefined) return <span className="text-ink-2">Comparing</span>;
  const parts = (['added', 'removed', 'changed'] as const).filter((kind) => data[kind] > 0);
  if (parts.length === 0) return <span className="text-ink-2">No row differs</span>;
  return (
    <TextLink href={href}>{parts.map((kind) => `${countWords(data[kind])} ${kind}`).join(', ')}</TextLink>
  );
}
