import { type AirframeVec } from '@/lib/frames/tags';

import { type Account, addAccounts, moveAccount, scaleAccount } from '../account';

/**
 * A part that can be taken out of a whole or moved in it: the pieces themselves, and their mirror image where a row also stands for
 * one. The image moves as an image does: against the pieces across the plane of symmetry, with them along it.
 */
export interface Part {
  readonly pieces: Account;
  readonly image: Account | null;
}

/** All of a part. */
export function accountOfPart({ pieces, image }: Part): Account {
  return image === null ? pieces : addAccounts(pieces, image);
}

/** A part carried along `by` (airframe components, m); `lateral` is the airframe component across the plane of symmetry. */
export function movePart({ pieces, image }: Part, by: AirframeVec, lateral: 0 | 1 | 2): Part {
  const across = (k: 0 | 1 | 2): number => (k === lateral ? 0 - by[k] : by[k]);
  return {
    pieces: moveAccount(pieces, by),
    image: image === null ? null : moveAccount(image, [across(0), across(1), across(2)]),
  };
}

/** The whole without a part of it, by subtraction of accounts: exact, not an estimate. */
export function without(whole: Account, part: Account): Account {
  return addAccounts(whole, scaleAccount(-1, part));
}

/** The whole with `part` replaced by `other`. */
export function withInstead(whole: Account, part: Part, other: Part): Account {
  return addAccounts(without(whole, accountOfPart(part)), accountOfPart(other));
}
