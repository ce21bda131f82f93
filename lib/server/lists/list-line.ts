import { type listsOfProgram } from '@/db/queries/lists';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type Finding } from '@/lib/findings/finding';

type Row = Awaited<ReturnType<typeof listsOfProgram>>[number];

export interface ListInProgram {
  readonly code: string;
  readonly title: string;
  readonly marking: string | null;
  readonly declarations: ListDeclarations;
  readonly revision: {
    readonly number: number;
    readonly rows: number;
    readonly memoRows: number;
    readonly at: Date;
    readonly author: string;
    readonly findings: readonly Finding[];
  } | null;
  readonly file: { readonly import: string; readonly state: 'waiting' | 'running' | 'failed' } | null;
}

/** A list as the program's lists are shown: its newest revision, and its newest file unless that became a revision. */
export function lineOf(row: Row): ListInProgram {
  const {
    code,
    title,
    marking,
    declarations,
    revised_at: at,
    author,
    import_id: file,
    import_state: state,
  } = row;
  return {
    code,
    title,
    marking,
    declarations,
    revision:
      at === null
        ? null
        : {
            number: row.number,
            rows: row.rows ?? 0,
            memoRows: row.memo_rows ?? 0,
            at,
            author: author ?? '',
            findings: row.findings ?? [],
          },
    file:
      file === null || state === null || state === 'done' || state === 'cancelled'
        ? null
        : { import: file, state },
  };
}
