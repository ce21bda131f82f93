import { type KeyLine } from '@/components/ui/key-help';

/** What the keys do on a page of three views. */
export const VIEWS_KEYS: readonly KeyLine[] = [
  { keys: ['T'], does: 'Go to the table of what is drawn' },
  { keys: ['Enter'], does: 'In the figures of the region, show it' },
  { keys: ['Up', 'Down', 'Left', 'Right'], does: 'Move in the table' },
  { keys: ['Shift + Up', 'Down', 'Left', 'Right'], does: 'Select cells' },
  { keys: ['Ctrl + C'], does: 'Copy the selected cells in full precision' },
];
