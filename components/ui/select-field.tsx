import { type ComponentProps, useId } from 'react';
import { CONTROL_CLASS, Field, fieldAria, type FieldWords } from '@/components/ui/field';
import { classes } from '@/components/ui/classes';

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
      <div className="relative">
        {/* The key keeps the choice: React resets a form after its action, and a select then forgets a changed default. */}
        <select
          key={String(defaultValue)}
          {...initial}
          {...select}
          {...fieldAria(id, words)}
          className={classes(CONTROL_CLASS, 'appearance-none pr-7')}
        >
          {placeholder === undefined ? null : <option value="">{placeholder}</option>}
          {options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled ?? false}>
              {option.label}
            </option>
          ))}
        </select>
        <svg
          width="8"
          height="8"
          viewBox="0 0 8 8"
          aria-hidden="true"
          className="pointer-events-none absolute inset-y-0 right-2.5 my-auto fill-none stroke-current"
        >
          <path d="M1 2.5 4 6 7 2.5" strokeWidth="1.5" />
        </svg>
      </div>
    </Field>
  );
}
