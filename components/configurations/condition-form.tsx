'use client';

import { useActionState, useState } from 'react';
import { CATEGORY_WORDS } from '@/components/configurations/category-words';
import { ItemsGrid, type ItemText } from '@/components/configurations/items-grid';
import { FormAnswer } from '@/components/forms/form-answer';
import { Actions } from '@/components/ui/actions';
import { ButtonLink } from '@/components/ui/button';
import { Checkbox } from '@/components/ui/choice';
import { FieldError } from '@/components/ui/field';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';
import { type AxisTriple } from '@/lib/frames/axes';
import { CATEGORIES, type Category } from '@/lib/mass/component';
import { type LengthUnit, type MassUnit } from '@/lib/units/table';

export interface ConditionFormProps {
  readonly action: FormAction;
  readonly fields: Readonly<Record<string, string>>;
  /** Null for a new condition. */
  readonly condition: {
    readonly code: string;
    readonly title: string;
    readonly categories: readonly Category[];
    readonly items: readonly ItemText[];
  } | null;
  readonly axes: AxisTriple;
  readonly massUnit: MassUnit;
  readonly lengthUnit: LengthUnit;
  readonly backHref: string;
}

/** One condition: which categories of list rows are on board, and named items with their masses and places. */
export function ConditionForm(props: ConditionFormProps) {
  const { action, fields, condition, axes, massUnit, lengthUnit, backHref } = props;
  const [state, send] = useActionState(action, IDLE);
  const [items, setItems] = useState<readonly ItemText[]>(condition?.items ?? []);
  const kept = state.values['categories'];
  const ticked: readonly string[] =
    state.status === 'failed' ? (kept ?? '').split(',') : (condition?.categories ?? ['empty']);
  const field = (name: 'code' | 'title') => ({
    name,
    defaultValue: state.values[name] ?? condition?.[name] ?? '',
    error: state.errors[name],
  });
  return (
    <form action={send} className="grid min-w-0 gap-4">
      <FormAnswer state={state} />
      {Object.entries(fields).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <input type="hidden" name="mass_unit" value={massUnit} />
      <input type="hidden" name="length_unit" value={lengthUnit} />
      <input type="hidden" name="items" value={JSON.stringify(items)} />
      {condition === null ? <input type="hidden" name="is_new" value="on" /> : null}
      <FormGrid>
        <FieldRow>
          <TextField
            {...field('title')}
            label="Title"
            hint="What people call it."
            autoComplete="off"
            required
          />
          <TextField
            {...field('code')}
            label="Code"
            hint={
              condition === null
                ? 'Lower-case letters, digits, hyphens.'
                : 'Stays as it is: baselines name it.'
            }
            autoComplete="off"
            readOnly={condition !== null}
            mono
            required
          />
        </FieldRow>
        <fieldset className="grid gap-1">
          <legend className="mb-1 font-semibold">Rows of the lists on board</legend>
          <div className="grid gap-x-6 sm:grid-cols-3">
            {CATEGORIES.map((category) => (
              <Checkbox
                key={category}
                name="categories"
                value={category}
                label={CATEGORY_WORDS[category]}
                defaultChecked={ticked.includes(category)}
              />
            ))}
          </div>
        </fieldset>
      </FormGrid>
      <ItemsGrid items={items} onItems={setItems} {...{ axes, massUnit, lengthUnit }} />
      {state.errors['items'] ? (
        <FieldError id="condition-items" text={state.errors['items'].join(' ')} />
      ) : null}
      <Actions>
        <SubmitButton pendingWords="Saving the condition">
          {condition === null ? 'Add condition' : 'Save condition'}
        </SubmitButton>
        <ButtonLink href={backHref} kind="quiet">
          Leave without saving
        </ButtonLink>
      </Actions>
    </form>
  );
}
