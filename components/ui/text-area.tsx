import { type ComponentProps, useId } from 'react';
import { CONTROL_CLASS, Field, fieldAria, type FieldWords } from '@/components/ui/field';
import { classes } from '@/components/ui/classes';

type TextAreaProps = FieldWords &
  Omit<ComponentProps<'textarea'>, 'className' | 'id'> & { readonly name: string };

/** Several lines of text: reasons, notes. */
export function TextArea({ label, hint, error, optional, rows = 4, ...input }: TextAreaProps) {
  const id = useId();
  const words = { label, hint, error, ...(optional === undefined ? {} : { optional }) };
  return (
    <Field id={id} {...words}>
      <textarea
        {...input}
        {...fieldAria(id, words)}
        rows={rows}
        className={classes(CONTROL_CLASS, 'resize-y')}
      />
    </Field>
  );
}
