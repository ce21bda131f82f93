import { type ListColumn } from '@/lib/ingest/mass-list/columns';
import { type Draft, type Mapping, positionOf } from './mapping';

/** Something that must be answered before a file can be read; `column` is the position in the file that it concerns. */
export interface Question {
  readonly id:
    'header' | 'column' | 'needed' | 'double' | 'numbers' | 'per' | 'totals' | 'texts' | 'headings';
  readonly column: number | null;
  readonly text: string;
}

const NEEDED: readonly ListColumn[] = ['mass', 'x', 'y', 'z'];

/** What a draft leaves open. A draft without questions is a mapping. */
export function questionsOf(draft: Draft): Question[] {
  const ask = (id: Question['id'], text: string, column: number | null = null): Question => ({
    id,
    column,
    text,
  });
  if (draft.header === null) return [ask('header', 'Which row holds the names of the columns?')];
  const open = draft.columns.flatMap(({ heading, to }, index) =>
    to === null
      ? [ask('column', `What is column ${index + 1}${heading === '' ? '' : `, \`${heading}\``}?`, index)]
      : [],
  );
  const missing = NEEDED.filter((column) => positionOf(draft.columns, column) === -1).map((column) =>
    ask('needed', `Which column is ${column}? Every list needs one.`),
  );
  const keyless = positionOf(draft.columns, 'item') === -1 && positionOf(draft.columns, 'part_number') === -1;
  return [
    ...open,
    ...(keyless
      ? [
          ask(
            'needed',
            'Which column is item, the key of a row? A part_number that is unique in the list will do.',
          ),
        ]
      : []),
    ...missing,
    ...doubles(draft),
    ...(draft.numbers === null ? [ask('numbers', 'How does the file write its numbers?')] : []),
    ...(draft.per === null
      ? [
          ask(
            'per',
            'Rows stand for several pieces. Are mass and own inertia of one piece, or of all pieces of the row together?',
          ),
        ]
      : []),
    ...(draft.leaveOut.totals === null
      ? [ask('totals', 'Some rows look like totals. Leave them out, once checked against the sum?')]
      : []),
    ...(draft.leaveOut.texts === null
      ? [ask('texts', 'Some rows hold one text and nothing else. Leave them out as titles and notes?')]
      : []),
    ...(draft.leaveOut.headings === null
      ? [ask('headings', 'Some rows repeat the headings. Leave them out?')]
      : []),
  ];
}

/** The draft as a mapping, or null while it leaves something open. */
export function mappingOf(draft: Draft): Mapping | null {
  const { header, numbers, per, leaveOut } = draft;
  const { totals, texts, headings } = leaveOut;
  if (questionsOf(draft).length > 0 || header === null || numbers === null || per === null) return null;
  if (totals === null || texts === null || headings === null) return null;
  const columns = draft.columns.flatMap(({ heading, to }) => (to === null ? [] : [{ heading, to }]));
  return {
    version: 1,
    delimiter: draft.delimiter,
    sheet: draft.sheet,
    header,
    columns,
    numbers,
    per,
    leaveOut: { totals, texts, headings },
  };
}

function doubles(draft: Draft): Question[] {
  const first = new Map<ListColumn, number>();
  return draft.columns.flatMap(({ to }, index) => {
    if (to?.use !== 'column') return [];
    const earlier = first.get(to.column);
    if (earlier === undefined) {
      first.set(to.column, index);
      return [];
    }
    const text = `Columns ${earlier + 1} and ${index + 1} are both ${to.column}. Which one is it?`;
    return [{ id: 'double', column: index, text } satisfies Question];
  });
}
