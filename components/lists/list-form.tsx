'use client';

import { type ReactNode, useActionState, useState } from 'react';
import { textsIn } from '@/components/forms/texts-in';
import { FormAnswer } from '@/components/forms/form-answer';
import { AxesFields } from '@/components/lists/axes-fields';
import { type SketchFrame, type TypedExample, TypedListSketch } from '@/components/lists/list-sketch';
import { EXTENT_WORDS, KIND_WORDS, PRODUCT_MEANING, UNCERTAINTY_WORDS } from '@/components/lists/list-words';
import { Actions } from '@/components/ui/actions';
import { ButtonLink } from '@/components/ui/button';
import { RadioGroup } from '@/components/ui/choice';
import { FormGrid } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { NumberField, TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';
import { EXTENTS, LIST_KINDS, PRODUCT_SIGNS, UNCERTAINTY_MEANINGS } from '@/lib/mass/declarations';
import { unitLabel } from '@/lib/units/names';
import { INERTIA_UNITS, LENGTH_UNITS, MASS_UNITS, type Unit } from '@/lib/units/table';

interface ListFormProps {
  readonly action: FormAction;
  readonly program: string;
  /** The list that is declared anew; null for a new one. */
  readonly list: string | null;
  readonly values: Readonly<Record<string, string>>;
  readonly cancelHref: string;
  /** The program's frame issues, newest first; the values name one as `frame_issue`. */
  readonly issues: readonly (SketchFrame & { readonly number: number; readonly title: string })[];
  /** A component of the list as it is; null for a new one. */
  readonly example: TypedExample | null;
}

/** Declares a list: what its figures mean, said once for all its rows. */
export function ListForm({ action, program, list, values, cancelHref, issues, example }: ListFormProps) {
  const [state, send] = useActionState(action, IDLE);
  const filled = { ...values, ...state.values };
  const field = (name: string) => ({ name, defaultValue: filled[name], error: state.errors[name] });
  const [texts, setTexts] = useState<Readonly<Record<string, string>>>(filled);
  const issue = issues.find(({ number }) => String(number) === texts['frame_issue']) ?? issues[0];
  return (
    <form action={send} onChange={(event) => setTexts(textsIn(event.currentTarget))}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        {list === null ? null : <input type="hidden" name="list" value={list} />}
        <TextField
          {...field('title')}
          label="Title"
          hint="What the list holds, e.g. Wing structure."
          required
        />
        {list === null ? (
          <TextField
            {...field('code')}
            label="Code"
            hint="Names the list in addresses and in the API, e.g. wing-structure. It stays."
            mono
            required
          />
        ) : null}
        <RadioGroup
          {...field('kind')}
          label="Kind"
          options={LIST_KINDS.map((kind) => ({
            value: kind,
            label: KIND_WORDS[kind],
            hint: KIND_HINTS[kind],
          }))}
        />
        <Units field={field} />
        <RadioGroup
          {...field('products')}
          label="Sign of the products of inertia in the file"
          hint="The most frequent error between weights and simulation teams. Ask the source if it does not say: nothing in the figures tells."
          required
          options={PRODUCT_SIGNS.map((sign) => ({
            value: sign,
            label: SIGN_LABELS[sign],
            hint: PRODUCT_MEANING[sign],
          }))}
        />
        <AxesFields values={filled} error={state.errors['axis_x']} />
        <Frame field={field}>
          {issues.length < 2 ? null : (
            <SelectField
              {...field('frame_issue')}
              label="Frame issue"
              hint="Coming files state their places in it. What is stated already stays in the issue that it was read in."
              options={issues.map(({ number, title }, index) => ({
                value: String(number),
                label: `${number}: ${title}${index === 0 ? ', in force' : ''}`,
              }))}
            />
          )}
        </Frame>
        {issue === undefined ? null : <TypedListSketch texts={texts} frame={issue} example={example} />}
        <RadioGroup
          {...field('extent')}
          label="Extent"
          options={EXTENTS.map((extent) => ({ value: extent, label: EXTENT_WORDS[extent] }))}
        />
        <RadioGroup
          {...field('uncertainty')}
          label="What the sigma columns hold"
          options={UNCERTAINTY_MEANINGS.map((meaning) => ({
            value: meaning,
            label: UNCERTAINTY_WORDS[meaning],
          }))}
        />
        <TextField
          {...field('marking')}
          label="Marking"
          hint="E.g. proprietary or export-controlled. It then stands on every page and file made from this list."
          optional
        />
        <Actions>
          <SubmitButton pendingWords={list === null ? 'Adding the list' : 'Saving the declarations'}>
            {list === null ? 'Add list' : 'Save declarations'}
          </SubmitButton>
          <ButtonLink href={cancelHref} kind="quiet">
            Leave without saving
          </ButtonLink>
        </Actions>
      </FormGrid>
    </form>
  );
}

const SIGN_LABELS = { positive: 'Positive integral', negative: 'Negative integral' } as const;

const KIND_HINTS = {
  components: 'Parts with their masses.',
  adjustments: 'Changes: what is added or removed, approved, pending or potential. Removals are negative.',
} as const;

interface PartProps {
  readonly field: (name: string) => {
    readonly name: string;
    readonly defaultValue: string | undefined;
    readonly error: readonly string[] | undefined;
  };
}

function Units({ field }: PartProps) {
  const units: readonly (readonly [string, string, readonly Unit[]])[] = [
    ['mass_unit', 'Mass', MASS_UNITS],
    ['length_unit', 'Length', LENGTH_UNITS],
    ['inertia_unit', 'Inertia', INERTIA_UNITS],
  ];
  return (
    <fieldset className="grid gap-1">
      <legend className="mb-1 font-semibold">Units of the file</legend>
      <div className="grid items-start gap-4 sm:grid-cols-3">
        {units.map(([name, label, options]) => (
          <SelectField
            key={name}
            {...field(name)}
            label={label}
            placeholder="Choose a unit"
            required
            options={options.map((unit) => ({ value: unit, label: unitLabel(unit) }))}
          />
        ))}
      </div>
      <p className="measure text-note text-ink-2">lb is mass. lbf·ft·s² is the same as slug·ft².</p>
    </fieldset>
  );
}

function Frame({ field, children }: PartProps & { readonly children: ReactNode }) {
  const row = (names: readonly string[], unit: string) => (
    <div className="grid grid-cols-3 items-start gap-4">
      {names.map((name) => (
        <NumberField
          key={name}
          {...field(name)}
          label={
            name.startsWith('origin')
              ? `Origin ${name.slice(-1)}`
              : `${name.slice(0, 1).toUpperCase()}${name.slice(1)}`
          }
          {...(unit === '' ? {} : { unit })}
          placeholder="0"
        />
      ))}
    </div>
  );
  return (
    <fieldset className="grid gap-2">
      <legend className="mb-1 font-semibold">Where the list&apos;s frame lies in the airframe</legend>
      <p className="measure text-note text-ink-2">
        Leave all of it blank where the list counts from the airframe datum. The origin is given along the
        airframe axes, in the length unit of the list.
      </p>
      {row(['origin_x', 'origin_y', 'origin_z'], '')}
      {row(['yaw', 'pitch', 'roll'], 'deg')}
      {children}
    </fieldset>
  );
}
