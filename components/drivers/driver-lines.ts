import { type DriverPart, type Drivers, partOf, wholeAccount } from '@/lib/drivers/drivers';
import { contributionOf, wholeOf } from '@/lib/mass/contributions/contribution';
import { accountOfPart } from '@/lib/mass/contributions/effects';

export interface DriverLine {
  readonly part: DriverPart;
  /** kg. */
  readonly mass: number;
  /** To the number looked into, SI. */
  readonly value: number;
  /** Of all contributions taken without signs, -1 to 1. */
  readonly share: number;
}

/** The parts with what they contribute, as they were ranked. */
export function driverLines(drivers: Drivers): DriverLine[] {
  const whole = wholeOf(wholeAccount(drivers), drivers.geometry);
  if (whole === null) return [];
  return drivers.parts.map((part) => {
    const account = accountOfPart(partOf(part));
    const value = contributionOf(account, whole)[drivers.number];
    return {
      part,
      mass: account.mass,
      value,
      share: drivers.gross === 0 ? 0 : value / drivers.gross,
    };
  });
}
