import { type DriverPart, type Drivers, partOf, wholeAccount } from '@/lib/drivers/drivers';
import { percentMac } from '@/lib/frames/chord';
import { lateralIndex } from '@/lib/frames/reflection';
import { accountOfPart, movePart, withInstead, without } from '@/lib/mass/contributions/effects';
import { type TenNumbers, tenOf } from '@/lib/mass/contributions/ten';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type Vec3 } from '@/lib/numerics/vec3';
import { toSi } from '@/lib/units/convert';
import { type LengthUnit } from '@/lib/units/table';

/** The ten numbers of a whole and its CG in per cent of the chord; null members where there is no CG or no chord. */
export interface State {
  readonly ten: TenNumbers | null;
  readonly percentMac: number | null;
}

export interface Effects {
  readonly now: State;
  readonly removed: State;
  /** Null when a field of the move is wrong. */
  readonly moved: State | null;
}

/** What becomes of the whole without a part of it, and with that part moved by `by` (airframe components, m). */
export function effectsOf(
  drivers: Pick<Drivers, 'geometry' | 'whole'>,
  chosen: DriverPart,
  by: Vec3 | null,
): Effects {
  const { geometry } = drivers;
  const whole = wholeAccount(drivers);
  const part = partOf(chosen);
  const state = (account: Parameters<typeof tenOf>[0]): State => stateOf(tenOf(account, geometry), geometry);
  return {
    now: state(whole),
    removed: state(without(whole, accountOfPart(part))),
    moved:
      by === null ? null : state(withInstead(whole, part, movePart(part, by, lateralIndex(geometry.axes)))),
  };
}

function stateOf(ten: TenNumbers | null, { lemac, mac, axes }: AirframeGeometry): State {
  return { ten, percentMac: ten && percentMac([ten.x, ten.y, ten.z], lemac, mac, axes) };
}

/** A length as a person types it, in m; blank is no move, null what is no number. */
export function typedMove(text: string, unit: LengthUnit): number | null {
  const plain = text.trim().replace(',', '.').replace('\u2212', '-');
  if (plain === '') return 0;
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(plain) && Number.isFinite(Number(plain))
    ? toSi(Number(plain), unit)
    : null;
}
