'use client';

import { useQuery } from '@tanstack/react-query';
import { ask } from '@/components/lists/ask';
import { type Presence, presenceSchema } from '@/lib/contracts/list-draft';

const EVERY_MS = 15_000;

/** Who is at work on a list, asked again while the page is open. `route` is the list's internal route. */
export function usePresence(route: string, start: Presence): Presence {
  const { data } = useQuery({
    queryKey: ['presence', route],
    queryFn: ({ signal }) => ask(`${route}/drafts`, presenceSchema, { signal }),
    initialData: start,
    staleTime: EVERY_MS,
    refetchInterval: EVERY_MS,
    refetchOnWindowFocus: true,
  });
  return data;
}
