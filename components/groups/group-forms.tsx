'use client';

import { useActionState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';
import { groupAbove, groupName, isWithin } from '@/lib/groups/breakdown';

interface FormProps {
  readonly action: FormAction;
  readonly program: string;
}

const options = (paths: readonly string[]) => paths.map((value) => ({ value, label: value }));
const CODE_HINT = 'Letters, digits, dots, hyphens. Groups stand in the order of their codes.';

/** Adds a group. */
export function AddGroupForm({ action, program, paths }: FormProps & { readonly paths: readonly string[] }) {
  const [state, send] = useActionState(action, IDLE);
  const field = (name: string) => ({ name, defaultValue: state.values[name], error: state.errors[name] });
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <FieldRow>
          <SelectField
            {...field('above')}
            label="Below"
            placeholder="Nothing: a top group"
            options={options(paths)}
          />
          <TextField {...field('name')} label="Name" autoComplete="off" required />
          <TextField {...field('code')} label="Code" hint={CODE_HINT} autoComplete="off" mono optional />
        </FieldRow>
        <Actions>
          <SubmitButton kind="secondary" pendingWords="Adding the group">
            Add group
          </SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}

interface OneGroupProps extends FormProps {
  readonly path: string;
}

/** Renames a group or puts it elsewhere: what is below it goes with it, and rows keep being read by their former name. */
export function MoveGroupForm({
  action,
  program,
  path,
  paths,
}: OneGroupProps & { readonly paths: readonly string[] }) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="path" value={path} />
        <FieldRow>
          <SelectField
            name="above"
            label="Below"
            placeholder="Nothing: a top group"
            defaultValue={state.values['above'] ?? groupAbove(path)}
            error={state.errors['above']}
            options={options(paths.filter((one) => !isWithin(one, path)))}
          />
          <TextField
            name="name"
            label="Name"
            defaultValue={state.values['name'] ?? groupName(path)}
            error={state.errors['name']}
            autoComplete="off"
            required
          />
        </FieldRow>
        <p className="measure text-ink-2">
          No row is rewritten: rows that say {path} are shown and rolled up under the new name from now on,
          those of earlier revisions and of files still to come. Baselines keep the names of their day.
        </p>
        <Actions>
          <SubmitButton pendingWords="Moving the group">Rename or move group</SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}

/** Gives a group a code, or takes it away. */
export function RecodeGroupForm({
  action,
  program,
  path,
  code,
}: OneGroupProps & { readonly code: string | null }) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="path" value={path} />
        <TextField
          name="code"
          label="Code"
          hint={CODE_HINT}
          defaultValue={state.values['code'] ?? code ?? ''}
          error={state.errors['code']}
          autoComplete="off"
          mono
          optional
        />
        <Actions>
          <SubmitButton pendingWords="Setting the code">Set code</SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}

interface TickedFormProps extends FormProps {
  readonly offered: readonly { readonly path: string; readonly words: string }[];
  readonly words: string;
}

/** Takes the ticked ones of some groups into the breakdown. */
export function TickedGroupsForm({ action, program, offered, words }: TickedFormProps) {
  const [state, send] = useActionState(action, IDLE);
  return (
    <form action={send} className="grid gap-4">
      <FormAnswer state={state} />
      <input type="hidden" name="program" value={program} />
      <ul className="grid max-h-[60vh] gap-x-8 overflow-y-auto sm:grid-cols-2 xl:grid-cols-3">
        {offered.map(({ path, words: about }, index) => (
          <li key={path}>
            <label className="flex items-start gap-2 py-1 pointer-coarse:py-2.5">
              <input
                type="checkbox"
                name={`path.${index}`}
                value={path}
                defaultChecked
                className="mt-0.5 size-4 shrink-0 accent-(--spin) pointer-coarse:size-5"
              />
              <span className="min-w-0 wrap-anywhere">
                {path} <span className="block text-note text-ink-2">{about}</span>
              </span>
            </label>
          </li>
        ))}
      </ul>
      <Actions>
        <SubmitButton pendingWords="Adding the groups">{words}</SubmitButton>
      </Actions>
    </form>
  );
}
