import { InertiaSymbol } from '@/components/mass/tensor-plate';
import { Num } from '@/components/mass/num';
import { BODY_AXES } from '@/components/mass/tensor-text';
import { type Moments } from '@/lib/frames/products';

const LETTERS = ['x', 'y', 'z'] as const;
const SYMBOLS = [
  ['ixx', 'ixy', 'ixz'],
  ['ixy', 'iyy', 'iyz'],
  ['ixz', 'iyz', 'izz'],
] as const;
const PRODUCTS = [
  { symbol: 'ixy', element: 'tensor[0][1]', integrand: 'x y' },
  { symbol: 'ixz', element: 'tensor[0][2]', integrand: 'x z' },
  { symbol: 'iyz', element: 'tensor[1][2]', integrand: 'y z' },
] as const;

interface SignPlateProps {
  /** Products and moments of one condition as the document states them, kg.m2; null where there is none. */
  readonly example: { readonly condition: string; readonly moments: Moments } | null;
}

/** The sign convention of the tensor, to be read from across a desk, with a number of the baseline to check one's reading by. */
export function SignPlate({ example }: SignPlateProps) {
  return (
    <figure className="keep-together grid content-start rounded border border-ink bg-sheet">
      <figcaption className="border-b border-rule px-4 py-2 font-semibold">
        Tensor about the CG, body axes
      </figcaption>
      <div className="overflow-x-auto px-2 py-4 sm:px-6">
        <table className="w-full table-fixed border-separate border-spacing-0 text-section">
          <thead>
            <tr>
              <td className="w-8 sm:w-28" />
              {LETTERS.map((letter) => (
                <th key={letter} scope="col" className="pb-2">
                  <Axis letter={letter} />
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {SYMBOLS.map((row, i) => (
              <tr key={LETTERS[i]}>
                <th scope="row" className="text-left">
                  <Axis letter={LETTERS[i] ?? 'x'} />
                </th>
                {row.map((symbol, j) => (
                  <td key={j} className={`px-1 py-2 text-center sm:text-title ${edges(i, j)}`}>
                    {i === j ? null : <span className="font-semibold text-spin">{'\u2212'}</span>}
                    <InertiaSymbol symbol={symbol} />
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <div className="grid gap-2 border-t border-rule px-4 py-3">
        <p className="text-section font-semibold">Products: positive integral</p>
        <p className="flex flex-wrap gap-x-6 text-lead">
          {PRODUCTS.map(({ symbol, integrand }) => (
            <span key={symbol} className="whitespace-nowrap">
              <InertiaSymbol symbol={symbol} /> = integral of {integrand} dm
            </span>
          ))}
        </p>
        <p className="text-lead">The off-diagonals of the tensor are minus the products.</p>
      </div>
      {example === null ? null : <Check {...example} />}
    </figure>
  );
}

/** The largest product of the baseline, in both of its guises. */
function Check({ condition, moments }: NonNullable<SignPlateProps['example']>) {
  const [largest] = PRODUCTS.toSorted((a, b) => Math.abs(moments[b.symbol]) - Math.abs(moments[a.symbol]));
  if (largest === undefined) return null;
  const value = moments[largest.symbol];
  return (
    <p className="border-t border-rule px-4 py-3">
      To check your reading: in condition <code>{condition}</code> the member <code>{largest.symbol}</code> is{' '}
      <Num value={value} decimals={2} plus className="font-semibold" /> and <code>{largest.element}</code> is{' '}
      <Num value={0 - value} decimals={2} plus className="font-semibold" /> <span className="num">kg·m²</span>
      .
    </p>
  );
}

function Axis({ letter }: { readonly letter: 'x' | 'y' | 'z' }) {
  return (
    <>
      {letter}
      <span className="ml-2 text-body font-normal text-ink-2 max-sm:sr-only">{BODY_AXES[letter]}</span>
    </>
  );
}

/** The strokes of the matrix's brackets that fall on this element's edges. */
function edges(i: number, j: number): string {
  return [
    j === 0 && 'bracket-left',
    j === 2 && 'bracket-right',
    i === 0 && j !== 1 && 'bracket-top',
    i === 2 && j !== 1 && 'bracket-bottom',
  ]
    .filter(Boolean)
    .join(' ');
}
