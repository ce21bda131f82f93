'use client';

import { useState } from 'react';
import { NumberName, unitOf } from '@/components/drivers/number-words';
import { isSummed, partOfRow, placedRow } from '@/components/lists/row-part';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { SelectField } from '@/components/ui/select-field';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type ListRow } from '@/lib/contracts/list-rows';
import { fromNumbers } from '@/lib/mass/account';
import { type Category } from '@/lib/mass/component';
import { contributionOf, wholeOf } from '@/lib/mass/contributions/contribution';
import { accountOfPart } from '@/lib/mass/contributions/effects';
import { type NameOfTen, TEN, tenOf } from '@/lib/mass/contributions/ten';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';

/** Something that the rows of the list are part of: the revision itself, or a condition of a configuration that pins it. */
export interface WholeOnPage {
  readonly key: string;
  readonly title: string;
  /** About the r0 of the list's frame issue: ten or twenty numbers. */
  readonly account: readonly number[];
  readonly categories: readonly Category[];
}

interface RowSharesProps {
  readonly row: ListRow;
  readonly declarations: ListDeclarations;
  readonly geometry: AirframeGeometry;
  /** The revision itself first. */
  readonly wholes: readonly WholeOnPage[];
}

/** What a row contributes to each of the ten numbers of the list, or of a configuration that pins it, in the list's units. */
export function RowShares({ row, declarations, geometry, wholes }: RowSharesProps) {
  const [key, setKey] = useState('');
  const chosen = wholes.find((one) => one.key === key) ?? wholes[0];
  if (chosen === undefined) return null;
  return (
    <section className="grid gap-2">
      <h4 className="font-semibold">What it contributes</h4>
      {wholes.length > 1 ? (
        <SelectField
          label="Contribution to"
          name="whole"
          value={chosen.key}
          onChange={(event) => setKey(event.target.value)}
          options={wholes.map((one) => ({ value: one.key, label: one.title }))}
        />
      ) : null}
      <Shares {...{ row, declarations, geometry }} whole={chosen} />
    </section>
  );
}

function Shares({
  row,
  declarations,
  geometry,
  whole: { title, account, categories },
}: Omit<RowSharesProps, 'wholes'> & { readonly whole: WholeOnPage }) {
  const placed = placedRow(row, declarations);
  const total = fromNumbers(account);
  const [whole, ten] = [wholeOf(total, geometry), tenOf(total, geometry)];
  if (placed === null) return null;
  if (!isSummed(row, categories))
    return (
      <p className="text-ink-2">Nothing: the row is shown there and not summed, or it is not on board.</p>
    );
  if (whole === null || ten === null)
    return <p className="text-ink-2">There is no mass above zero, and so no CG to contribute to.</p>;
  const own = contributionOf(accountOfPart(partOfRow(placed, declarations, geometry)), whole);
  const units = {
    mass: declarations.massUnit,
    length: declarations.lengthUnit,
    inertia: declarations.inertiaUnit,
  };
  return (
    <>
      <Table caption={`Contribution to: ${title}`} captionHidden>
        <thead>
          <tr>
            <ColumnHead>Number</ColumnHead>
            <ColumnHead side="right">This row</ColumnHead>
            <ColumnHead side="right">Whole</ColumnHead>
            <ColumnHead side="right" unit="%">
              Share
            </ColumnHead>
          </tr>
        </thead>
        <tbody>
          {TEN.map((number) => {
            const unit = unitOf(number, units);
            // The panel is narrow: full precision is on hover, as everywhere.
            const [part, all] = [fromSi(own[number], unit), fromSi(ten[number], unit)];
            return (
              <tr key={number}>
                <RowHead>
                  <NumberName number={number} axes={geometry.axes} />{' '}
                  <span className="text-note text-ink-2">{unitLabel(unit)}</span>
                </RowHead>
                <Cell side="right">
                  <Num value={part} digits={4} plus={number !== 'mass'} />
                </Cell>
                <Cell side="right">
                  <Num value={all} decimals={sharedDecimals([all], [], 5)} />
                </Cell>
                <Cell side="right">
                  <Num value={isPlace(number) || all === 0 ? null : (100 * part) / all} digits={3} />
                </Cell>
              </tr>
            );
          })}
        </tbody>
      </Table>
      <p className="measure text-note text-ink-2">
        Without growth, all pieces and mirror images. Of the CG: its lever m (x - CG)/M, airframe axes; all
        levers add up to zero. Of the inertia: about the CG of the whole, body axes, products as positive
        integrals; where they cancel, a share can exceed 100 %.
      </p>
    </>
  );
}

function isPlace(number: NameOfTen): boolean {
  return number.length === 1;
}
