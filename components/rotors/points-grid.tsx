'use client';

import { useRouter } from 'next/navigation';
import { useActionState, useState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { asGrid, type GridPoint, NO_EDITS, type PointEdits, rpmText } from '@/components/rotors/points-edits';
import { Actions } from '@/components/ui/actions';
import { Button } from '@/components/ui/button';
import { classes } from '@/components/ui/classes';
import { FieldError } from '@/components/ui/field';
import { SubmitButton } from '@/components/ui/submit-button';
import { Cell, ColumnHead, Table } from '@/components/ui/table';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, type FormState, IDLE } from '@/lib/form-state';
import { type OperatingPoint } from '@/lib/rotors/rotor';

interface PointsGridProps {
  readonly action: FormAction;
  readonly program: string;
  /** The newest revision, which the edits are laid over. */
  readonly base: number;
  readonly shafts: readonly string[];
  readonly points: readonly OperatingPoint[];
}

/**
 * Shaft speeds by operating point, edited in place. Only what was changed is kept beside the revision, so that someone else's
 * newer revision can be put underneath without losing it.
 */
export function PointsGrid({ action, program, base, shafts, points }: PointsGridProps) {
  const router = useRouter();
  const [edits, setEdits] = useState<PointEdits>(NO_EDITS);
  const [sigmas, setSigmas] = useState(false);
  const [state, send, pending] = useActionState<FormState, FormData>(async (before, form) => {
    const after = await action(before, form);
    if (after.status === 'done') setEdits(NO_EDITS);
    return after;
  }, IDLE);
  const grid = asGrid(points, edits, shafts);
  const type = (code: string, name: string, text: string) =>
    setEdits({ ...edits, cells: { ...edits.cells, [code]: { ...edits.cells[code], [name]: text } } });
  const remove = (code: string) =>
    setEdits({
      ...edits,
      added: edits.added.filter((one) => one !== code),
      removed: points.some((point) => point.code === code) ? [...edits.removed, code] : edits.removed,
    });
  const changed = edits !== NO_EDITS;
  return (
    <form action={send} className="grid min-w-0 gap-4">
      <FormAnswer state={state} />
      {state.status === 'failed' && Object.keys(state.errors).length === 0 ? (
        <div>
          <Button onClick={() => router.refresh()}>Put my changes on the newest revision</Button>
        </div>
      ) : null}
      <input type="hidden" name="program" value={program} />
      <input type="hidden" name="base" value={base} />
      <input type="hidden" name="points" value={JSON.stringify(grid)} />
      <label className="flex items-center gap-2">
        <input
          type="checkbox"
          checked={sigmas}
          onChange={(event) => setSigmas(event.target.checked)}
          className="size-4 accent-(--spin)"
        />
        Show standard deviations of the speeds
      </label>
      <Table caption="Shaft speeds in rpm; a negative speed turns the other way, 0 stands still">
        <thead>
          <tr>
            <ColumnHead>Point</ColumnHead>
            <ColumnHead>Title</ColumnHead>
            {shafts.map((shaft) => (
              <ColumnHead key={shaft} side="right">
                {shaft}
              </ColumnHead>
            ))}
            <ColumnHead>
              <span className="sr-only">Remove</span>
            </ColumnHead>
          </tr>
        </thead>
        <tbody>
          {grid.map((point) => (
            <tr key={point.code}>
              <th scope="row" className="text-left leading-7 font-normal whitespace-nowrap">
                {point.code}
              </th>
              <Cell>
                <GridInput
                  label={`Title of ${point.code}`}
                  text={point.title}
                  edited={edits.cells[point.code]?.['title'] !== undefined}
                  onText={(text) => type(point.code, 'title', text)}
                  wide
                />
              </Cell>
              {point.speeds.map(({ shaft, rpm, sigma }) => (
                <Cell key={shaft} side="right">
                  <GridInput
                    label={`${shaft} at ${point.code}, rpm`}
                    text={rpm}
                    edited={edits.cells[point.code]?.[`rpm ${shaft}`] !== undefined}
                    onText={(text) => type(point.code, `rpm ${shaft}`, text)}
                  />
                  {sigmas ? (
                    <span className="flex items-center justify-end gap-1 text-note text-ink-2">
                      ±
                      <GridInput
                        label={`Standard deviation of ${shaft} at ${point.code}, rpm`}
                        text={sigma}
                        edited={edits.cells[point.code]?.[`sigma ${shaft}`] !== undefined}
                        onText={(text) => type(point.code, `sigma ${shaft}`, text)}
                      />
                    </span>
                  ) : null}
                </Cell>
              ))}
              <Cell>
                <Button kind="quiet" onClick={() => remove(point.code)}>
                  Remove
                </Button>
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
      {state.errors['points'] ? (
        <FieldError id="points-grid" text={state.errors['points'].join(' ')} />
      ) : null}
      <NewPoint
        taken={grid}
        onAdd={(code) =>
          setEdits({
            ...edits,
            added: [...edits.added, code],
            removed: edits.removed.filter((one) => one !== code),
          })
        }
      />
      {changed ? (
        <div className="grid max-w-160 gap-4 border-t border-rule pt-4">
          <TextField
            name="reason"
            label="Reason for this revision"
            defaultValue={state.values['reason']}
            error={state.errors['reason']}
            maxLength={1000}
            required
          />
          <Actions>
            <SubmitButton
              pendingWords={`Saving revision ${base + 1}`}
            >{`Save revision ${base + 1}`}</SubmitButton>
            <Button onClick={() => setEdits(NO_EDITS)} disabled={pending}>
              Discard changes
            </Button>
          </Actions>
        </div>
      ) : null}
    </form>
  );
}

interface GridInputProps {
  readonly label: string;
  readonly text: string;
  /** Differs from the revision beneath. */
  readonly edited: boolean;
  readonly onText: (text: string) => void;
  readonly wide?: boolean;
}

function GridInput({ label, text, edited, onText, wide = false }: GridInputProps) {
  return (
    <input
      aria-label={label}
      value={text}
      onChange={(event) => onText(event.target.value)}
      inputMode={wide ? 'text' : 'decimal'}
      autoComplete="off"
      spellCheck={false}
      className={classes(
        'min-h-7 border-b border-ink-2 px-1 hover:border-ink pointer-coarse:min-h-11',
        edited ? 'bg-chosen' : 'bg-transparent',
        wide ? 'w-56' : 'num w-24 text-right',
      )}
    />
  );
}

function NewPoint({
  taken,
  onAdd,
}: {
  readonly taken: readonly GridPoint[];
  readonly onAdd: (code: string) => void;
}) {
  const [code, setCode] = useState('');
  const [wrong, setWrong] = useState<string | null>(null);
  const add = () => {
    const wanted = code.trim();
    const problem =
      wanted === ''
        ? 'Give the point a code, as in take-off.'
        : taken.some((point) => point.code === wanted)
          ? `There is a point ${wanted} already.`
          : null;
    setWrong(problem);
    if (problem !== null) return;
    onAdd(wanted);
    setCode('');
  };
  return (
    <div className="flex flex-wrap items-end gap-4">
      <div className="w-56">
        <TextField
          name="new-point"
          label="New operating point, code"
          value={code}
          onChange={(event) => setCode(event.target.value)}
          onKeyDown={(event) => {
            if (event.key !== 'Enter') return;
            event.preventDefault();
            add();
          }}
          error={wrong}
          maxLength={100}
          autoComplete="off"
        />
      </div>
      <Button onClick={add}>Add operating point</Button>
    </div>
  );
}

/** The same speeds, to be looked at. */
export function PointsTable({ shafts, points }: Pick<PointsGridProps, 'shafts' | 'points'>) {
  return (
    <Table caption="Shaft speeds in rpm; a negative speed turns the other way, 0 stands still">
      <thead>
        <tr>
          <ColumnHead>Point</ColumnHead>
          <ColumnHead>Title</ColumnHead>
          {shafts.map((shaft) => (
            <ColumnHead key={shaft} side="right">
              {shaft}
            </ColumnHead>
          ))}
        </tr>
      </thead>
      <tbody>
        {points.map((point) => (
          <tr key={point.code}>
            <th scope="row" className="text-left leading-7 font-normal whitespace-nowrap">
              {point.code}
            </th>
            <Cell>{point.title}</Cell>
            {shafts.map((shaft) => {
              const speed = point.speeds.find((one) => one.shaft === shaft);
              return (
                <Cell key={shaft} side="right" className="num">
                  {speed ? rpmText(speed.speed) : <span className="font-sans text-limit">missing</span>}
                  {speed?.sigma ? <span className="text-ink-2"> ± {rpmText(speed.sigma)}</span> : null}
                </Cell>
              );
            })}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
