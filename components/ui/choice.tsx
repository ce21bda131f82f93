import { type ComponentProps, type ReactNode, useId } from 'react';
import { errorText, FieldError, type FieldWords } from '@/components/ui/field';

const BOX =
  'mt-0.5 size-4 shrink-0 accent-(--spin) disabled:cursor-not-allowed pointer-coarse:mt-0 pointer-coarse:size-5';
const ROW = 'flex items-start gap-2 py-1 pointer-coarse:py-2.5';

type CheckboxProps = Omit<ComponentProps<'input'>, 'className' | 'id' | 'children' | 'type'> & {
  readonly name: string;
  readonly label: ReactNode;
  readonly hint?: ReactNode;
  readonly error?: FieldWords['error'];
};

/** Yes or no. Sends `value` (default `on`) when ticked. */
export function Checkbox({ label, hint, error, ...input }: CheckboxProps) {
  const id = useId();
  const wrong = errorText(error);
  const described = [hint ? `${id}-hint` : '', wrong ? `${id}-error` : ''].filter(Boolean).join(' ');
  return (
    <div>
      <div className={ROW}>
        <input
          {...input}
          type="checkbox"
          id={id}
          aria-describedby={described || undefined}
          aria-invalid={wrong ? true : undefined}
          className={BOX}
        />
        <label htmlFor={id}>{label}</label>
      </div>
      {hint ? (
        <div id={`${id}-hint`} className="measure pl-6 text-note text-ink-2">
          {hint}
        </div>
      ) : null}
      {wrong ? <FieldError id={id} text={wrong} /> : null}
    </div>
  );
}

interface RadioOption {
  readonly value: string;
  readonly label: ReactNode;
  readonly hint?: ReactNode;
}

interface RadioGroupProps extends FieldWords {
  readonly name: string;
  readonly options: readonly RadioOption[];
  readonly defaultValue?: string | undefined;
  readonly value?: string;
  readonly onChange?: (value: string) => void;
  /** Side by side where there is room. */
  readonly inline?: boolean;
  readonly required?: boolean;
}

/** One of a few, all in sight. */
export function RadioGroup(props: RadioGroupProps) {
  const { label, hint, error, optional, name, options, defaultValue, value, onChange, inline, required } =
    props;
  const id = useId();
  const wrong = errorText(error);
  const described = [hint ? `${id}-hint` : '', wrong ? `${id}-error` : ''].filter(Boolean).join(' ');
  return (
    <fieldset aria-describedby={described || undefined} className="grid content-start gap-1">
      <legend className="mb-1 text-body font-semibold">
        {label}
        {optional ? <span className="font-normal text-ink-2"> (optional)</span> : null}
      </legend>
      {hint ? (
        <div id={`${id}-hint`} className="measure text-note text-ink-2">
          {hint}
        </div>
      ) : null}
      <div className={inline ? 'flex flex-wrap gap-x-6' : 'grid'}>
        {options.map((option) => (
          <div key={option.value} className={ROW}>
            <input
              type="radio"
              id={`${id}-${option.value}`}
              name={name}
              value={option.value}
              required={required ?? false}
              {...(value === undefined
                ? { defaultChecked: option.value === defaultValue }
                : { checked: option.value === value, onChange: () => onChange?.(option.value) })}
              aria-describedby={option.hint ? `${id}-${option.value}-hint` : undefined}
              className={BOX}
            />
            <div>
              <label htmlFor={`${id}-${option.value}`}>{option.label}</label>
              {option.hint ? (
                <div id={`${id}-${option.value}-hint`} className="measure text-note text-ink-2">
                  {option.hint}
                </div>
              ) : null}
            </div>
          </div>
        ))}
      </div>
      {wrong ? <FieldError id={id} text={wrong} /> : null}
    </fieldset>
  );
}
