'use client';

import { useVirtualizer } from '@tanstack/react-virtual';
import { type RefObject } from 'react';

const HEAD_HEIGHT = 32;
const FOOT_HEIGHT = 28;

/** Which lines of a scrolled box are in sight: from `first` up to, not including, `last`. `show` brings a line into sight. */
export function useRowWindow(box: RefObject<HTMLElement | null>, count: number, rowHeight: number) {
  // The rule guards the React compiler's memoisation, which this project doesn't use; nothing returned here is memoised.
  // eslint-disable-next-line react-hooks/incompatible-library
  const virtual = useVirtualizer({
    count,
    getScrollElement: () => box.current,
    estimateSize: () => rowHeight,
    overscan: 12,
    initialRect: { width: 1200, height: 640 },
    scrollPaddingStart: HEAD_HEIGHT,
    scrollPaddingEnd: FOOT_HEIGHT,
  });
  const items = virtual.getVirtualItems();
  return {
    first: items[0]?.index ?? 0,
    last: (items.at(-1)?.index ?? -1) + 1,
    show: (line: number) => virtual.scrollToIndex(line, { align: 'auto' }),
  };
}
