'use client';

import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { ask } from '@/components/lists/ask';
import { type RowGroups, rowGroupsSchema } from '@/lib/contracts/list-groups';

/** The groups of the rows of a view by a column; `start` is what they are by group and without a filter. */
export function useRowGroups(from: string, query: string, by: string, start: RowGroups | null) {
  const asked = new URLSearchParams(query);
  asked.delete('sort');
  const isStart = start !== null && by === 'group' && asked.size === 0;
  asked.set('by', by);
  const { data, error, isPlaceholderData, refetch } = useQuery({
    queryKey: ['groups', from, asked.toString()],
    queryFn: ({ signal }) => ask(`${from}/groups?${asked.toString()}`, rowGroupsSchema, { signal }),
    enabled: !isStart,
    staleTime: Infinity,
    placeholderData: keepPreviousData,
  });
  return {
    groups: isStart ? start : (data ?? null),
    isOld: !isStart && isPlaceholderData,
    error: isStart ? null : error,
    retry: () => void refetch(),
  };
}
