'use client';

import { useId, useState } from 'react';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import {
  BODY_AXES,
  CONVENTION,
  type NamedAxes,
  PRODUCT_ORDER,
  tensorElements,
  type TensorCell,
  tensorTsv,
  type TensorView,
} from '@/components/mass/tensor-text';
import { classes } from '@/components/ui/classes';
import { CopyButton } from '@/components/ui/copy-button';
import { type Moments } from '@/lib/frames/products';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type InertiaUnit } from '@/lib/units/table';

interface TensorPlateProps {
  /** kg.m2, products as positive integrals. */
  readonly moments: Moments;
  /** 1 sigma of each, kg.m2. */
  readonly sigma?: Moments;
  readonly unit?: InertiaUnit;
  /** What the tensor is of and about, e.g. "Inertia about the CG, body axes". */
  readonly title?: string;
  readonly axes?: NamedAxes;
}

/** A tensor with its axes named, its signs printed and tinted, its convention stated and switchable. */
export function TensorPlate(props: TensorPlateProps) {
  const {
    moments,
    sigma,
    unit = 'kg.m2',
    title = 'Inertia about the CG, body axes',
    axes = BODY_AXES,
  } = props;
  const [view, setView] = useState<TensorView>('elements');
  const values = PRODUCT_ORDER.map((symbol) => fromSi(moments[symbol], unit));
  const sigmas = sigma ? PRODUCT_ORDER.map((symbol) => fromSi(sigma[symbol], unit)) : [];
  const decimals = sharedDecimals(values, sigmas);
  const shared = { moments, sigma, unit, decimals, axes };
  return (
    <figure className="keep-together w-full max-w-160 rounded border border-ink bg-sheet">
      <figcaption className="flex flex-wrap items-baseline justify-between gap-x-4 border-b border-rule px-4 py-2">
        <span className="font-semibold">{title}</span>
        <span className="num">{unitLabel(unit)}</span>
      </figcaption>
      {view === 'elements' ? <Elements {...shared} /> : <Products {...shared} />}
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-t border-rule px-4 py-2 text-note">
        <p className="basis-full sm:basis-auto">{CONVENTION[view]}</p>
        <div className="no-print flex flex-wrap items-baseline gap-x-4">
          <ViewSwitch view={view} onChange={setView} />
          <CopyButton words="Copy" text={tensorTsv(moments, unit, view, title, axes)} />
        </div>
      </div>
    </figure>
  );
}

interface ViewProps {
  readonly moments: Moments;
  readonly sigma: Moments | undefined;
  readonly unit: InertiaUnit;
  readonly decimals: number;
  readonly axes: NamedAxes;
}

const LETTERS = ['x', 'y', 'z'] as const;

function Elements({ moments, sigma, unit, decimals, axes }: ViewProps) {
  return (
    <div className="overflow-x-auto px-2 py-3 sm:px-4">
      <table className="w-full table-fixed border-separate border-spacing-0">
        <thead>
          <tr>
            <td className="w-8 sm:w-20" />
            {LETTERS.map((letter) => (
              <th key={letter} scope="col" className="px-1 pb-1 text-right sm:px-2">
                <AxisName letter={letter} word={axes[letter]} />
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {tensorElements(moments, unit).map((row, index) => {
            const letter = LETTERS[index] ?? 'x';
            return (
              <tr key={letter}>
                <th scope="row" className="pr-1 text-left sm:pr-2">
                  <AxisName letter={letter} word={axes[letter]} />
                </th>
                {row.map((cell, column) => (
                  <td
                    key={column}
                    className={classes(
                      'px-1 py-1.5 text-right align-top sm:px-2',
                      bracket(index, column),
                      !cell.diagonal && signTint(cell.value),
                    )}
                  >
                    <Element
                      cell={cell}
                      decimals={decimals}
                      sigma={sigma && fromSi(sigma[cell.symbol], unit)}
                    />
                  </td>
                ))}
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}

function AxisName({ letter, word }: { readonly letter: string; readonly word: string }) {
  return (
    <>
      {letter}
      <span className="ml-1.5 text-note font-normal text-ink-2 max-sm:sr-only">{word}</span>
    </>
  );
}

function Element({
  cell,
  decimals,
  sigma,
}: {
  readonly cell: TensorCell;
  readonly decimals: number;
  readonly sigma: number | undefined;
}) {
  return (
    <>
      <div className="text-left text-note text-ink-2">
        {cell.diagonal ? null : '\u2212'}
        <InertiaSymbol symbol={cell.symbol} />
      </div>
      <Num value={cell.value} decimals={decimals} plus={!cell.diagonal} className="max-sm:text-note" />
      {sigma === undefined ? null : <Sigma sigma={sigma} decimals={decimals} />}
    </>
  );
}

function Sigma({ sigma, decimals }: { readonly sigma: number; readonly decimals: number }) {
  return (
    <div className="text-note text-ink-2">
      ± <Num value={sigma} decimals={decimals} />
    </div>
  );
}

/** Ixy with its letters lowered. */
export function InertiaSymbol({ symbol }: { readonly symbol: keyof Moments }) {
  return (
    <>
      I<sub className="text-[0.83em]">{symbol.slice(1)}</sub>
    </>
  );
}

function Products({ moments, sigma, unit, decimals }: ViewProps) {
  const rows = [
    ['ixx', 'ixy'],
    ['iyy', 'ixz'],
    ['izz', 'iyz'],
  ] as const;
  return (
    <table className="my-3 w-full table-fixed border-separate border-spacing-0 px-2 sm:px-4">
      <thead>
        <tr>
          <th scope="col" className="px-2 pb-1 text-left">
            Moments
          </th>
          <th scope="col" className="px-2 pb-1 text-left">
            Products
          </th>
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row[0]}>
            {row.map((symbol, column) => {
              const value = fromSi(moments[symbol], unit);
              return (
                <td
                  key={symbol}
                  className={classes('border-t border-rule px-2 py-1.5', column === 1 && signTint(value))}
                >
                  <div className="flex flex-wrap items-baseline justify-between gap-x-2">
                    <span className="text-ink-2">
                      <InertiaSymbol symbol={symbol} />
                    </span>
                    <span className="ml-auto text-right">
                      <Num
                        value={value}
                        decimals={decimals}
                        plus={column === 1}
                        className="max-sm:text-note"
                      />
                      {sigma ? <Sigma sigma={fromSi(sigma[symbol], unit)} decimals={decimals} /> : null}
                    </span>
                  </div>
                </td>
              );
            })}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function ViewSwitch({
  view,
  onChange,
}: {
  readonly view: TensorView;
  readonly onChange: (view: TensorView) => void;
}) {
  const name = useId();
  const words: Record<TensorView, string> = { elements: 'Tensor elements', products: 'Products' };
  return (
    <fieldset className="flex gap-3">
      <legend className="sr-only">Shown as</legend>
      {(['elements', 'products'] as const).map((each) => (
        <label key={each} className="switch-word">
          <input
            type="radio"
            name={name}
            checked={view === each}
            onChange={() => onChange(each)}
            className="sr-only"
          />
          {words[each]}
        </label>
      ))}
    </fieldset>
  );
}

function signTint(value: number): string | false {
  if (value === 0) return false;
  return value > 0 ? 'bg-plus' : 'bg-minus';
}

/** The strokes of the matrix's brackets that fall on this element's edges. */
function bracket(row: number, column: number): string {
  return classes(
    column === 0 && 'bracket-left',
    column === 2 && 'bracket-right',
    row === 0 && column !== 1 && 'bracket-top',
    row === 2 && column !== 1 && 'bracket-bottom',
  );
}
