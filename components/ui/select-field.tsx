import { type ComponentProps, useId } from 'react';
import { Field, fieldAria, type FieldWords } from '@/components/ui/field';
import { SelectControl } from '@/components/ui/select-control';

export interface Option {
  readonly value: string;
  readonly label: string;
  readonly disabled?: boolean;
}

type SelectFieldProps = FieldWords &
  Omit<ComponentProps<'select'>, 'className' | 'id' | 'children'> & {
    readonly name: string;
    readonly options: readonly Option[];
    /** Shown while nothing is chosen; its value is the empty string. */
    readonly placeholder?: string;
  };

/** One of a list, a native select. */
export function SelectField(props: SelectFieldProps) {
  const { label, hint, error, optional, options, placeholder, defaultValue, ...select } = props;
  const id = useId();
  const words = { label, hint, error, ...(optional === undefined ? {} : { optional }) };
  const initial = select.value === undefined ? { defaultValue: defaultValue ?? '' } : {};
  return (
    <Field id={id} {...words}>
      {/* The key keeps the choice: React resets a form after its action, and a select then forgets a changed default. */}
      <SelectControl key={String(defaultValue)} {...initial} {...select} {...fieldAria(id, words)}>
        {placeholder === undefined ? null : <option value="">{placeholder}</option>}
        {options.map((option) => (
          <option key={option.value} value={option.value} disabled={option.disabled ?? false}>
            {option.label}
          </option>
        ))}
      </SelectControl>
    </Field>
  );
}
