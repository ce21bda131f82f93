'use client';

import { useId, useState } from 'react';
import { counted } from '@/components/lists/list-words';
import { Actions } from '@/components/ui/actions';
import { Button } from '@/components/ui/button';
import { Day } from '@/components/ui/day';
import { Section } from '@/components/ui/section';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type Choice, type Clash, type Clashes } from '@/lib/contracts/list-draft';

type Take = Choice['take'];

interface ClashPanelProps {
  readonly clashes: Clashes;
  readonly base: number;
  readonly busy: boolean;
  readonly onChoose: (choices: readonly Choice[]) => void;
}

/** Rows that two people changed, each version beside the other and the one before: nothing is taken until it is chosen. */
export function ClashPanel({ clashes: told, base, busy, onChoose }: ClashPanelProps) {
  const { clashes, onto, author, at } = told;
  const [chosen, setChosen] = useState<ReadonlyMap<string, Take>>(new Map());
  const asked = clashes.flatMap(questionsOf);
  const open = asked.filter(({ id }) => !chosen.has(id)).length;
  const choose = (ids: readonly string[], take: Take) =>
    setChosen((before) => new Map([...before, ...ids.map((id) => [id, take] as const)]));
  const ids = asked.map(({ id }) => id);
  return (
    <Section
      title={`${counted(clashes.length, 'row')} changed by both`}
      lead={
        <>
          {author} made revision {onto} at <Day at={new Date(at)} time />, after you began from revision{' '}
          {base}. Nothing is saved and nothing is lost: choose whose version of each stands. All other changes
          of both are kept.
        </>
      }
      aside={
        <div className="flex flex-wrap gap-x-4">
          <Button kind="quiet" onClick={() => choose(ids, 'mine')}>
            Take mine everywhere
          </Button>
          <Button kind="quiet" onClick={() => choose(ids, 'theirs')}>
            Take theirs everywhere
          </Button>
        </div>
      }
    >
      <Table caption="Both versions of what both changed" captionHidden>
        <thead>
          <tr>
            <ColumnHead>Row</ColumnHead>
            <ColumnHead>Field</ColumnHead>
            <ColumnHead>{`Before, revision ${base}`}</ColumnHead>
            <ColumnHead>Mine</ColumnHead>
            <ColumnHead>{`Theirs, revision ${onto}`}</ColumnHead>
          </tr>
        </thead>
        <tbody>
          {asked.map((question) => (
            <Question
              key={question.id}
              question={question}
              take={chosen.get(question.id)}
              onTake={(take) => choose([question.id], take)}
            />
          ))}
        </tbody>
      </Table>
      <Actions>
        <Button
          kind="primary"
          disabled={open > 0 || busy}
          aria-busy={busy}
          onClick={() =>
            onChoose(
              asked.flatMap(({ id, key, column }) => {
                const take = chosen.get(id);
                return take === undefined ? [] : [{ key, column, take }];
              }),
            )
          }
        >
          {`Go on from revision ${onto} with these`}
        </Button>
        {open === 0 ? null : <p className="text-ink-2">{`${counted(open, 'choice')} to make`}</p>}
      </Actions>
    </Section>
  );
}

interface Asked {
  readonly id: string;
  readonly key: string;
  readonly item: string;
  /** Null: the row is chosen whole. */
  readonly column: string | null;
  readonly field: string;
  readonly before: string;
  readonly mine: string;
  readonly theirs: string;
}

const blank = (text: string | null): string => (text === null || text === '' ? 'blank' : text);

function questionsOf({ key, item, kind, fields }: Clash): readonly Asked[] {
  if (kind === 'fields' || kind === 'both-added') {
    return fields.map(({ column, before, mine, theirs }) => ({
      id: JSON.stringify([key, column]),
      key,
      item,
      column,
      field: column,
      before: kind === 'both-added' ? 'no such row' : blank(before),
      mine: blank(mine),
      theirs: blank(theirs),
    }));
  }
  const told = (side: 'before' | 'mine' | 'theirs') =>
    fields.map((field) => `${field.column} ${blank(field[side])}`).join(', ');
  return [
    {
      id: JSON.stringify([key, null]),
      key,
      item,
      column: null,
      field: 'the row',
      before: told('before'),
      mine: kind === 'i-removed' ? 'row removed' : told('mine'),
      theirs: kind === 'they-removed' ? 'row removed' : told('theirs'),
    },
  ];
}

function Question({
  question,
  take,
  onTake,
}: {
  readonly question: Asked;
  readonly take: Take | undefined;
  readonly onTake: (take: Take) => void;
}) {
  const name = useId();
  const side = (which: Take) => (
    <Cell className={take === which ? 'min-w-32 bg-chosen' : 'min-w-32'}>
      <label className="flex cursor-pointer items-baseline gap-2">
        <input
          type="radio"
          name={name}
          checked={take === which}
          onChange={() => onTake(which)}
          aria-label={`${which} for ${question.item}, ${question.field}: ${question[which]}`}
          className="accent-(--spin)"
        />
        <span className="font-mono wrap-anywhere">{question[which]}</span>
      </label>
    </Cell>
  );
  return (
    <tr>
      <RowHead>
        <span className="font-mono wrap-anywhere">{question.item}</span>
      </RowHead>
      <Cell>{question.field}</Cell>
      <Cell className="font-mono text-ink-2 wrap-anywhere">{question.before}</Cell>
      {side('mine')}
      {side('theirs')}
    </tr>
  );
}
