import { type Direction } from '@/lib/frames/axes';
import {
  type Extent,
  type ListDeclarations,
  type ListKind,
  type ProductSign,
  type UncertaintyMeaning,
} from '@/lib/mass/declarations';
import { asTyped, degreesAsTyped } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';

export const KIND_WORDS: Readonly<Record<ListKind, string>> = {
  components: 'Components',
  adjustments: 'Adjustments',
};

export const EXTENT_WORDS: Readonly<Record<Extent, string>> = {
  whole: 'The whole aircraft, as far as the list goes',
  'left-half': 'The left half, standing for its mirror image too',
  'right-half': 'The right half, standing for its mirror image too',
};

export const UNCERTAINTY_WORDS: Readonly<Record<UncertaintyMeaning, string>> = {
  '1sigma': 'One standard deviation',
  '2sigma': 'Two standard deviations',
  '3sigma': 'Three standard deviations',
  'half-width': 'Half the width of a uniform band',
};

export const PRODUCT_WORDS: Readonly<Record<ProductSign, string>> = {
  positive: 'positive integral',
  negative: 'negative integral',
};

/** What the sign means, with the formula that settles it. */
export const PRODUCT_MEANING: Readonly<Record<ProductSign, string>> = {
  positive: 'A cell holds +∫xy dm. The tensor element is minus what the cell holds.',
  negative: 'A cell holds −∫xy dm: the sign is already that of the tensor element.',
};

/** `x aft, y right, z up` */
export function axesWords([x, y, z]: readonly [Direction, Direction, Direction]): string {
  return `x ${x}, y ${y}, z ${z}`;
}

/** Where a list's frame lies in the airframe, in the list's own length unit and degrees. */
export function poseWords({ pose, lengthUnit }: ListDeclarations): string {
  const place = pose.origin.map((value) => String(asTyped(value, lengthUnit)));
  const turn = [pose.yaw, pose.pitch, pose.roll].map((value) => String(degreesAsTyped(value)));
  const at = pose.origin.every((value) => value === 0)
    ? 'Origin at the airframe datum'
    : `Origin at ${place.join(', ')} ${unitLabel(lengthUnit)} from the airframe datum`;
  return turn.every((value) => value === '0')
    ? at
    : `${at}, turned by yaw ${turn[0] ?? ''}, pitch ${turn[1] ?? ''}, roll ${turn[2] ?? ''} deg`;
}

/** `lb, in, lb·in²` */
export function unitWords({ massUnit, lengthUnit, inertiaUnit }: ListDeclarations): string {
  return [massUnit, lengthUnit, inertiaUnit].map(unitLabel).join(', ');
}

/** A whole number with its digits in threes. */
export function countWords(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+$)/g, ' ');
}

/** `1 row`, `12 rows` */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${countWords(count)} ${count === 1 ? one : many}`;
}

/** About how long, as people say it: `A few seconds`, `About 40 seconds`, `About 3 minutes`. */
export function durationWords(seconds: number): string {
  if (seconds < 5) return 'A few seconds';
  if (seconds < 55) return `About ${Math.ceil(seconds / 5) * 5} seconds`;
  const minutes = Math.ceil(seconds / 60);
  return minutes === 1 ? 'About a minute' : `About ${countWords(minutes)} minutes`;
}
