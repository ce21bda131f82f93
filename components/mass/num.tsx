import { classes } from '@/components/ui/classes';
import { decimalsFor, digitGroups, type NumberText, numberText } from '@/components/mass/number-text';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type Unit } from '@/lib/units/table';

interface NumProps {
  /** In SI when `unit` is given, otherwise as it is to be shown; null is shown as a dash. */
  readonly value: number | null;
  readonly unit?: Unit;
  /** Prints the unit after the number. In tables the column head carries it. */
  readonly showUnit?: boolean;
  /** Decimals to print; otherwise `digits` significant digits. */
  readonly decimals?: number;
  readonly digits?: number;
  /** Decimals of the column: shorter numbers leave their room, so that points stand under each other. */
  readonly padTo?: number;
  /** Prints the sign of positive numbers too. */
  readonly plus?: boolean;
  readonly className?: string;
}

/** A number in the number face. Full precision is in its title, its `data` value, and nothing but digits is copied. */
export function Num(props: NumProps) {
  const { value, unit, showUnit = false, digits = 6, padTo, plus = false, className } = props;
  if (value === null) {
    return (
      <span className={classes('num text-ink-2', className)}>
        <span aria-hidden="true">–</span>
        <span className="sr-only">none</span>
        <Pad fraction="" to={padTo} />
      </span>
    );
  }
  const shown = unit ? fromSi(value, unit) : value;
  const text = numberText(shown, props.decimals ?? decimalsFor(shown, digits), plus);
  const label = unit ? unitLabel(unit) : '';
  return (
    <data
      value={String(shown)}
      title={unit ? `${shown} ${label}` : String(shown)}
      className={classes('num', className)}
    >
      <NumberDigits text={text} padTo={padTo} />
      {showUnit && label ? <span className="num-unit"> {label}</span> : null}
    </data>
  );
}

/** The digits alone, grouped, with the sign and the room of the decimals left out. */
export function NumberDigits({
  text,
  padTo,
}: {
  readonly text: NumberText;
  readonly padTo?: number | undefined;
}) {
  return (
    <>
      {text.sign === '-' ? <span className="num-minus">-</span> : text.sign}
      {digitGroups(text.whole, 'right').map((group, index) => (
        <span key={index} className="num-group">
          {group}
        </span>
      ))}
      {text.fraction ? '.' : null}
      {text.exponent ? `${text.fraction}e${text.exponent}` : <Fraction digits={text.fraction} to={padTo} />}
    </>
  );
}

function Fraction({ digits, to }: { readonly digits: string; readonly to: number | undefined }) {
  return (
    <>
      <span className="num-fraction">
        {digitGroups(digits, 'left').map((group, index) => (
          <span key={index} className="num-group">
            {group}
          </span>
        ))}
      </span>
      <Pad fraction={digits} to={to} />
    </>
  );
}

/** Invisible room for the decimals that a column has and this number has not, groups set apart alike. */
function Pad({ fraction, to }: { readonly fraction: string; readonly to: number | undefined }) {
  const missing = (to ?? 0) - fraction.length;
  if (missing <= 0) return null;
  const rest = digitGroups('0'.repeat(to ?? 0), 'left')
    .join(' ')
    .slice(fraction.length + groupGaps(fraction));
  return (
    <span className="num-pad" aria-hidden="true">
      {fraction === '' ? '.' : null}
      {rest.split(' ').map((group, index) => (
        <span key={index} className="num-group">
          {group}
        </span>
      ))}
    </span>
  );
}

function groupGaps(fraction: string): number {
  return fraction === '' ? 0 : Math.ceil(fraction.length / 3) - 1;
}
