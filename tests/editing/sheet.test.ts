import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { DRAFT_ROWS, type DraftEdit } from '@/lib/contracts/list-draft';
import { readBlock, writeBlock } from '@/lib/editing/block';
import { mixedMarks, pointed } from '@/lib/editing/decimal-marks';
import { differences, freshHistory, type History, redone, undone, withStep } from '@/lib/editing/history';
import { neutraliseFormula } from '@/lib/export/formula-text';
import {
  addRow,
  blockAt,
  clearCells,
  fillDown,
  type Outcome,
  pasteBlock,
  removeRows,
  restoreRows,
  setCell,
  setRow,
} from '@/lib/editing/sheet';
import { area, editsOf, ids, ROWS, sheetOf } from './support';

function after(outcome: Outcome): (DraftEdit | null)[] {
  if (!outcome.done) throw new Error(outcome.why);
  return outcome.changes.map((change) => change.after);
}
const why = (outcome: Outcome): string | null => (outcome.done ? null : outcome.why);

describe('a block from a spreadsheet', () => {
  it('keeps tabs, line breaks and doubled quotes inside quotes', () => {
    expect(readBlock('a\t"two\nlines"\r\n"say ""so"""\tb\r\n')).toEqual([
      ['a', 'two\nlines'],
      ['say "so"', 'b'],
    ]);
  });

  it('takes a quote that closes no cell for a mark', () => {
    expect(readBlock('5" bolt\t"6" bolt\t"open')).toEqual([['5" bolt', '"6" bolt', '"open']]);
  });

  it('fills rows that are short, keeps blank cells and lines, and makes no row of the last line break', () => {
    expect(readBlock('a\t\tb\n\nc\n')).toEqual([
      ['a', '', 'b'],
      ['', '', ''],
      ['c', '', ''],
    ]);
    expect(readBlock('')).toEqual([['']]);
    expect(readBlock('a\t')).toEqual([['a', '']]);
  });

  it('comes back as it was written, and is read alike by another reader of tab-separated text', () => {
    const cell = fc.stringMatching(/^[ -~\t\n"=+é]{0,8}$/);
    fc.assert(
      fc.property(fc.array(fc.tuple(cell, cell), { minLength: 1, maxLength: 4 }), (block) => {
        const text = writeBlock(block);
        expect(readBlock(text)).toEqual(block);
        const other = Papa.parse<string[]>(text, { delimiter: '\t', newline: '\n' }).data;
        expect(other).toEqual(block.map((row) => row.map(neutraliseFormula)));
      }),
    );
  });

  it('takes from text what a spreadsheet would run', () => {
    expect(writeBlock([['=1+1', '-2.5', '@x']])).toBe("'=1+1\t-2.5\t'@x");
  });
});

describe('decimal marks', () => {
  it('turn into points where a comma can be nothing else, and stay where it may separate thousands', () => {
    expect(['12,5', ' 0,250 ', '-1,5e-3', '12,500', '1,234,567', '=1,5', '12.5'].map(pointed)).toEqual([
      '12.5',
      '0.250',
      '-1.5e-3',
      '12,500',
      '1,234,567',
      '=1,5',
      '12.5',
    ]);
  });

  it('are in doubt where a comma stands beside a point with three digits after it', () => {
    expect(mixedMarks(['1.234', '12,5'])).toEqual({ comma: '12,5', doubtful: '1.234' });
    expect(mixedMarks(['1.2345', '12,5'])).toBeNull();
    expect(mixedMarks(['1.234', '12.5'])).toBeNull();
  });
});

describe('writing into cells', () => {
  it('makes an edit of what differs, and none of what is put back, numbers by their value', () => {
    const first = setCell(sheetOf(), 0, 2, ' 7,4 ', ids());
    expect(after(first)).toEqual([{ kind: 'change', item: 'A', fields: { mass: '7.4' } }]);
    const edited = sheetOf(editsOf({ kind: 'change', item: 'A', fields: { mass: '7.4' } }));
    expect(after(setCell(edited, 0, 2, '7.30', ids()))).toEqual([null]);
  });

  it('clears and fills down, from the line above where one line is selected', () => {
    expect(after(clearCells(sheetOf(), area(0, 1, 1, 1), ids()))).toEqual([
      { kind: 'change', item: 'A', fields: { description: '' } },
      { kind: 'change', item: 'B', fields: { description: '' } },
    ]);
    const three = after(fillDown(sheetOf(), area(0, 2, 2, 3), ids()));
    expect(three).toEqual([
      { kind: 'change', item: 'B', fields: { mass: '7.3', x: '100' } },
      { kind: 'change', item: 'C', fields: { mass: '7.3', x: '100' } },
    ]);
    expect(after(fillDown(sheetOf(), area(2, 2), ids()))).toEqual([
      { kind: 'change', item: 'C', fields: { mass: '2' } },
    ]);
    expect(why(fillDown(sheetOf(), area(0, 2), ids()))).toMatch(/no line above/);
    expect(why(fillDown(sheetOf(), area(0, 0, 2, 2), ids()))).toMatch(/item of its own/);
  });

  it('refuses to write into a removed row, and into one that is not loaded, and then changes nothing', () => {
    const removed = sheetOf(editsOf({ kind: 'remove', item: 'B' }));
    expect(why(clearCells(removed, area(0, 2, 2, 2), ids()))).toMatch(/`B` is removed/);
    const away = { ...sheetOf(), rowAt: (line: number) => (line === 2 ? null : (ROWS[line] ?? null)) };
    expect(why(clearCells(away, area(0, 2, 2, 2), ids()))).toMatch(/not loaded/);
    expect(blockAt(away, area(1, 2, 2, 2))).toBeNull();
  });

  it('takes a whole row from a form, blank fields of a new one aside', () => {
    expect(after(setRow(sheetOf(), 0, { item: 'A', mass: '7.3', note: 'weighed', x: '100' }))).toEqual([
      { kind: 'change', item: 'A', fields: { note: 'weighed' } },
    ]);
    const added = sheetOf(editsOf({ kind: 'add', id: 'q', place: 1, fields: { item: 'N' } }));
    expect(after(setRow(added, 3, { item: 'N', mass: '2', note: '' }))).toEqual([
      { kind: 'add', id: 'q', place: 1, fields: { item: 'N', mass: '2' } },
    ]);
  });
});

describe('pasting', () => {
  it('goes from the first cell on; lines beyond the end become rows', () => {
    const outcome = pasteBlock(
      sheetOf(),
      area(2, 0),
      [
        ['C', 'skin', '4,5'],
        ['D', 'new', '=1+1'],
      ],
      ids(),
    );
    expect(after(outcome)).toEqual([
      { kind: 'change', item: 'C', fields: { mass: '4.5' } },
      { kind: 'add', id: 'n1', place: 1, fields: { item: 'D', description: 'new', mass: '=1+1' } },
    ]);
    expect(outcome).toMatchObject({ area: area(2, 0, 3, 2) });
  });

  it('repeats a block that fits the selection a whole number of times', () => {
    const edits = after(pasteBlock(sheetOf(), area(0, 2, 2, 3), [['9']], ids()));
    expect(edits.map((edit) => edit?.kind === 'change' && edit.fields)).toEqual(
      Array(3).fill({ mass: '9', x: '9' }),
    );
  });

  it('is refused whole where columns would be lost or decimal marks are in doubt', () => {
    expect(why(pasteBlock(sheetOf(), area(0, 3), [['1', '2']], ids()))).toMatch(/has 2 columns, and only 1 /);
    expect(why(pasteBlock(sheetOf(), area(0, 2), [['1.234', '12,5']], ids()))).toMatch(/thousands separator/);
    expect(
      why(
        pasteBlock(
          sheetOf(),
          area(0, 0),
          [
            ['a', 'b', '1.234'],
            ['c', '12,5', '4'],
          ],
          ids(),
        ),
      ),
    ).toBeNull();
  });

  it('is refused beyond what a draft holds', () => {
    const block = Array.from({ length: DRAFT_ROWS }, () => ['1']);
    expect(why(pasteBlock(sheetOf(), area(0, 2), block, ids()))).toBeNull();
    expect(why(pasteBlock(sheetOf(), area(0, 2), [...block, ['1']], ids()))).toMatch(/At most 10000 rows/);
  });
});

describe('rows', () => {
  it('are added at the end, removed, put back; an added one goes at once', () => {
    expect(after(addRow(sheetOf(), ids()))).toEqual([{ kind: 'add', id: 'n1', place: 1, fields: {} }]);
    const edits = editsOf(
      { kind: 'change', item: 'B', fields: { mass: '3' } },
      { kind: 'add', id: 'q', place: 1, fields: {} },
    );
    expect(after(removeRows(sheetOf(edits), area(1, 0, 3, 0)))).toEqual([
      { kind: 'remove', item: 'B' },
      { kind: 'remove', item: 'C' },
      null,
    ]);
    expect(after(restoreRows(sheetOf(editsOf({ kind: 'remove', item: 'A' })), area(0, 0)))).toEqual([null]);
  });
});

describe('undo', () => {
  const step = (history: History, outcome: Outcome): History =>
    outcome.done ? withStep(history, outcome.changes) : history;

  it('goes back and forth over any sequence of steps, to the very same edits', () => {
    const move = fc.record({
      what: fc.constantFrom('set', 'clear', 'fill', 'paste', 'remove', 'restore', 'add'),
      line: fc.nat(4),
      column: fc.integer({ min: 1, max: 3 }),
      text: fc.constantFrom('1', '7.3', '', 'x', '12,5'),
    });
    fc.assert(
      fc.property(fc.array(move, { maxLength: 12 }), (moves) => {
        const next = ids();
        const seen: History[] = [freshHistory([])];
        for (const { what, line, column, text } of moves) {
          const last = seen.at(-1);
          if (last === undefined) throw new Error('no history');
          const sheet = sheetOf(last.edits);
          const cell = area(line, column);
          const outcome =
            what === 'set'
              ? setCell(sheet, line, column, text, next)
              : what === 'clear'
                ? clearCells(sheet, cell, next)
                : what === 'fill'
                  ? fillDown(sheet, cell, next)
                  : what === 'paste'
                    ? pasteBlock(sheet, cell, [[text], [text]], next)
                    : what === 'remove'
                      ? removeRows(sheet, cell)
                      : what === 'restore'
                        ? restoreRows(sheet, cell)
                        : addRow(sheet, next);
          const then = step(last, outcome);
          if (then !== last) seen.push(then);
        }
        let now = seen.at(-1) ?? freshHistory([]);
        for (const want of seen.slice(0, -1).reverse()) {
          now = undone(now);
          expect(now.edits).toEqual(want.edits);
        }
        expect(undone(now)).toBe(now);
        for (const want of seen.slice(1)) {
          now = redone(now);
          expect(now.edits).toEqual(want.edits);
        }
        expect(redone(now)).toBe(now);
      }),
    );
  });

  it('makes no step of what changes nothing, and forgets what was undone after a new step', () => {
    const first = withStep(freshHistory([]), [{ key: 'row A', after: { kind: 'remove', item: 'A' } }]);
    expect(withStep(first, [{ key: 'row A', after: { kind: 'remove', item: 'A' } }])).toBe(first);
    const other = withStep(undone(first), [{ key: 'row B', after: { kind: 'remove', item: 'B' } }]);
    expect(redone(other)).toBe(other);
  });

  it('tells the server what to put and what to drop', () => {
    const [a, b]: DraftEdit[] = [
      { kind: 'remove', item: 'A' },
      { kind: 'remove', item: 'B' },
    ];
    if (a === undefined || b === undefined) throw new Error('no edits');
    expect(differences(editsOf(a), new Map([['row B', b]]))).toEqual({ put: [b], drop: ['row A'] });
    expect(differences(editsOf(a), editsOf(a))).toEqual({ put: [], drop: [] });
  });
});
