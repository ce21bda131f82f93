import { Num } from '@/components/mass/num';
import {
  INCLINATION_SIGN,
  inclinationSense,
  pairingTies,
  principalInclination,
} from '@/lib/mass/inclination';
import { type Principal } from '@/lib/mass/principal';
import { degrees } from '@/lib/units/convert';

interface PrincipalNotesProps {
  readonly basic: Principal;
  readonly predicted: Principal | null;
}

/** The trade's inclination of the principal axis with its sense, and where the order of the axes is a matter of choice. */
export function PrincipalNotes({ basic, predicted }: PrincipalNotesProps) {
  const both = [
    { name: 'Basic', principal: basic },
    ...(predicted === null ? [] : [{ name: 'Predicted', principal: predicted }]),
  ];
  const ties = both.flatMap(({ name, principal }) =>
    pairingTies(principal).map(({ text }) => (both.length === 1 ? text : `${name}: ${text}`)),
  );
  return (
    <div className="measure grid gap-1 text-ink-2">
      <p>
        Inclination of the principal x axis to body x, in the plane of symmetry:{' '}
        {both.map(({ name, principal }, index) => (
          <span key={name}>
            {index === 0 ? '' : '; '}
            {name.toLowerCase()} <Inclination angle={principalInclination(principal)} />
          </span>
        ))}
        . It is {INCLINATION_SIGN}.
      </p>
      {ties.length === 0 ? null : (
        <ul className="grid gap-1">
          {ties.map((tie) => (
            <li key={tie}>{tie}</li>
          ))}
        </ul>
      )}
    </div>
  );
}

/** An angle less than this, rad, is what rounding leaves of none. */
const NO_ANGLE = 1e-9;

/** Signed, with the sense of the sign in words. */
function Inclination({ angle }: { readonly angle: number }) {
  const told = Math.abs(angle) < NO_ANGLE ? 0 : angle;
  const sense = inclinationSense(told);
  return (
    <>
      <Num value={degrees(told)} decimals={3} />°{sense === null ? '' : `, ${sense}`}
    </>
  );
}
