import { Actions } from '@/components/ui/actions';
import { Button } from '@/components/ui/button';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';

interface CompareFormProps {
  /** The page of changes, which takes `from` and `to`. */
  readonly action: string;
  /** Of the revisions, the newest first. */
  readonly numbers: readonly number[];
}

/** Chooses two revisions of a list to be compared, in either order. */
export function CompareForm({ action, numbers }: CompareFormProps) {
  const options = numbers.map((number) => ({ value: String(number), label: `Revision ${number}` }));
  return (
    <form action={action} method="get">
      <FormGrid>
        <FieldRow>
          <SelectField name="from" label="From" options={options} defaultValue={options[1]?.value ?? ''} />
          <SelectField name="to" label="To" options={options} defaultValue={options[0]?.value ?? ''} />
        </FieldRow>
        <Actions>
          <Button type="submit">Compare revisions</Button>
        </Actions>
      </FormGrid>
    </form>
  );
}
