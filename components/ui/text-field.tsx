import { type ComponentProps, useId } from 'react';
import { CONTROL_CLASS, Field, fieldAria, type FieldWords } from '@/components/ui/field';
import { classes } from '@/components/ui/classes';

const READ_ONLY = 'read-only:bg-transparent';

type InputProps = Omit<ComponentProps<'input'>, 'className' | 'id' | 'children' | 'type'>;

type TextFieldProps = FieldWords &
  InputProps & {
    readonly name: string;
    readonly type?: 'text' | 'email' | 'password' | 'search' | 'url' | 'date';
    /** Set in the number face: codes, digests, part numbers. */
    readonly mono?: boolean;
  };

/** One line of text, a native input: works in a form with a server action. */
export function TextField({ label, hint, error, optional, mono, type = 'text', ...input }: TextFieldProps) {
  const id = useId();
  const words = { label, hint, error, ...(optional === undefined ? {} : { optional }) };
  return (
    <Field id={id} {...words}>
      <input
        {...input}
        {...fieldAria(id, words)}
        type={type}
        className={classes(CONTROL_CLASS, READ_ONLY, mono && 'font-mono')}
      />
    </Field>
  );
}

type NumberFieldProps = FieldWords &
  InputProps & {
    readonly name: string;
    /** Stands inside the field's right end, e.g. `kg·m²`. */
    readonly unit?: string;
  };

/**
 * A number as the user wrote it, with its unit inside the right end. A text input with a decimal keypad: a number input would
 * drop what it can't read, and the server must be able to name it. Parsing belongs to the form's schema.
 */
export function NumberField({ label, hint, error, optional, unit, ...input }: NumberFieldProps) {
  const id = useId();
  const words = { label, hint, error, ...(optional === undefined ? {} : { optional }) };
  const aria = fieldAria(id, words);
  const unitId = unit ? `${id}-unit` : '';
  const described = [aria['aria-describedby'], unitId].filter(Boolean).join(' ');
  return (
    <Field id={id} {...words}>
      <div className="relative">
        <input
          autoComplete="off"
          {...input}
          {...aria}
          aria-describedby={described || undefined}
          type="text"
          inputMode="decimal"
          spellCheck={false}
          className={classes(CONTROL_CLASS, READ_ONLY, 'num text-right', unit && unitRoom(unit))}
        />
        {unit ? (
          <span
            id={unitId}
            className="pointer-events-none absolute inset-y-0 right-2 flex items-center text-note text-ink-2"
          >
            {unit}
          </span>
        ) : null}
      </div>
    </Field>
  );
}

/** Room at the right end for a unit of that many letters. */
function unitRoom(unit: string): string {
  if (unit.length <= 3) return 'pr-10';
  return unit.length <= 7 ? 'pr-16' : 'pr-24';
}
