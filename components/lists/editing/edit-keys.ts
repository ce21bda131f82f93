import { type KeyLine } from '@/components/ui/key-help';

/** The keys of the editing grid. */
export const EDIT_KEYS: readonly KeyLine[] = [
  { keys: ['Up', 'Down', 'Left', 'Right'], does: 'Move; with Ctrl, to the edge of the grid' },
  { keys: ['Home', 'End'], does: 'First or last column; with Ctrl, first or last row too' },
  { keys: ['Page Up', 'Page Down'], does: 'One screen of rows' },
  { keys: ['Shift + Up', 'Down', 'Left', 'Right'], does: 'Select cells' },
  { keys: ['Shift + Space'], does: 'Select whole rows' },
  { keys: ['Ctrl + A'], does: 'Select all cells' },
  { keys: ['Enter', 'F2'], does: 'Edit the cell; typing begins it anew' },
  { keys: ['Enter'], does: 'While editing: keep it and go down; with Shift, up' },
  { keys: ['Tab'], does: 'While editing: keep it and go right; with Shift, left' },
  { keys: ['Escape'], does: 'While editing: leave the cell as it was' },
  { keys: ['Delete'], does: 'Blank the selected cells' },
  { keys: ['Ctrl + C', 'Ctrl + X', 'Ctrl + V'], does: 'Copy, cut, paste, also to and from a spreadsheet' },
  { keys: ['Ctrl + D'], does: 'Fill down from the first selected line, or from the line above' },
  { keys: ['Ctrl + Z', 'Ctrl + Y'], does: 'Undo, redo' },
];
