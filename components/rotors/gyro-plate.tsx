import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { classes } from '@/components/ui/classes';
import { CopyButton } from '@/components/ui/copy-button';
import { type Mat3 } from '@/lib/numerics/mat3';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type AngularMomentumUnit } from '@/lib/units/table';

interface GyroPlateProps {
  /** G in body axes, kg.m2/s. */
  readonly matrix: Mat3;
  readonly unit: AngularMomentumUnit;
  /** Of what, e.g. "all rotors, cruise". */
  readonly of: string;
}

const LETTERS = ['x', 'y', 'z'] as const;
const WORDS = { x: 'forward', y: 'right', z: 'down' } as const;
/** Which component of h stands where, with its sign. */
const SYMBOLS = [
  ['', '\u2212z', 'y'],
  ['z', '', '\u2212x'],
  ['\u2212y', 'x', ''],
] as const;

const CONVENTION = 'G w = h × w, so that J dw/dt = M + G w − w × (J w) at constant rotor speed.';

/** The gyroscopic matrix, its elements named, its sign convention stated. */
export function GyroPlate({ matrix, unit, of }: GyroPlateProps) {
  const shown = matrix.map((row) => row.map((value) => fromSi(value, unit)));
  const decimals = sharedDecimals(shown.flat());
  const title = `Gyroscopic matrix G, body axes: ${of}`;
  const text = [
    `${title}; x forward, y right, z down; ${unit}; right-hand rule; G w = h x w`,
    ...shown.map((row) => row.map(String).join('\t')),
  ].join('\n');
  return (
    <figure className="keep-together w-full max-w-160 rounded border border-ink bg-sheet">
      <figcaption className="flex flex-wrap items-baseline justify-between gap-x-4 border-b border-rule px-4 py-2">
        <span className="font-semibold">{title}</span>
        <span className="num">{unitLabel(unit)}</span>
      </figcaption>
      <div className="overflow-x-auto px-2 py-3 sm:px-4">
        <table className="w-full table-fixed border-separate border-spacing-0">
          <thead>
            <tr>
              <td className="w-8 sm:w-20" />
              {LETTERS.map((letter) => (
                <th key={letter} scope="col" className="px-1 pb-1 text-right sm:px-2">
                  {letter}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {shown.map((row, index) => {
              const letter = LETTERS[index] ?? 'x';
              return (
                <tr key={letter}>
                  <th scope="row" className="pr-1 text-left sm:pr-2">
                    {letter}
                    <span className="ml-1.5 text-note font-normal text-ink-2 max-sm:sr-only">
                      {WORDS[letter]}
                    </span>
                  </th>
                  {row.map((value, column) => (
                    <td
                      key={column}
                      className={classes(
                        'px-1 py-1.5 text-right align-top sm:px-2',
                        bracket(index, column),
                        tint(value),
                      )}
                    >
                      <div className="h-4 text-left text-note text-ink-2">
                        <Symbol text={SYMBOLS[index]?.[column] ?? ''} />
                      </div>
                      <Num value={value} decimals={decimals} plus className="max-sm:text-note" />
                    </td>
                  ))}
                </tr>
              );
            })}
          </tbody>
        </table>
      </div>
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-t border-rule px-4 py-2 text-note">
        <p>Right-hand rule. {CONVENTION}</p>
        <CopyButton words="Copy" text={text} />
      </div>
    </figure>
  );
}

/** `−z` as minus h with z lowered. */
function Symbol({ text }: { readonly text: string }) {
  if (text === '') return null;
  return (
    <>
      {text.length > 1 ? text.slice(0, 1) : null}h<sub className="text-[0.83em]">{text.slice(-1)}</sub>
    </>
  );
}

function tint(value: number): string | false {
  if (value === 0) return false;
  return value > 0 ? 'bg-plus' : 'bg-minus';
}

function bracket(row: number, column: number): string {
  return classes(
    column === 0 && 'bracket-left',
    column === 2 && 'bracket-right',
    row === 0 && column !== 1 && 'bracket-top',
    row === 2 && column !== 1 && 'bracket-bottom',
  );
}
