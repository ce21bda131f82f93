import { Button } from '@/components/ui/button';
import { SelectField } from '@/components/ui/select-field';
import { QUANTITY_NAMES } from '@/components/baselines/quantity';
import { ACCOUNT_QUANTITIES, type AccountQuantity } from '@/lib/baselines/mass-account';
import { type BaselineState } from '@/lib/baselines/states';
import { type UnitSystem } from '@/lib/units/names';

interface AccountChoiceProps {
  readonly path: string;
  /** The newest first. */
  readonly baselines: readonly {
    readonly number: number;
    readonly title: string;
    readonly state: BaselineState;
  }[];
  readonly sides: { readonly from: number; readonly to: number };
  readonly quantity: AccountQuantity;
  readonly condition: string | null;
  readonly units: UnitSystem;
}

/** Which two baselines and which quantity the account is about; the choice is the page's address. */
export function AccountChoice({ path, baselines, sides, quantity, condition, units }: AccountChoiceProps) {
  const options = baselines.map(({ number, title, state }) => ({
    value: String(number),
    label: `${number}. ${title}${state === 'withdrawn' ? ' (withdrawn)' : ''}`,
  }));
  return (
    <form
      action={path}
      className="no-print grid items-end gap-4 sm:grid-cols-[minmax(0,1fr)_minmax(0,1fr)_160px_auto]"
    >
      {condition === null ? null : <input type="hidden" name="condition" value={condition} />}
      {units === 'si' ? null : <input type="hidden" name="units" value={units} />}
      <SelectField name="from" label="From baseline" options={options} defaultValue={String(sides.from)} />
      <SelectField name="to" label="To baseline" options={options} defaultValue={String(sides.to)} />
      <SelectField
        name="quantity"
        label="Quantity"
        options={ACCOUNT_QUANTITIES.map((one) => ({ value: one, label: QUANTITY_NAMES[one] }))}
        defaultValue={quantity}
      />
      <Button type="submit">Show account</Button>
    </form>
  );
}
