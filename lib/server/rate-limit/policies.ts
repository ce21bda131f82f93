export interface RatePolicy {
  readonly name: string;
  /** Requests allowed in one window. */
  readonly quota: number;
  readonly windowSeconds: number;
}

const MINUTE = 60;

/** How often what may be tried. By account where one is named, by address besides. */
export const RATE_POLICIES = {
  signInAccount: { name: 'sign-in-account', quota: 10, windowSeconds: 15 * MINUTE },
  signInAddress: { name: 'sign-in-address', quota: 60, windowSeconds: 15 * MINUTE },
  passwordAccount: { name: 'password-account', quota: 10, windowSeconds: 15 * MINUTE },
  mailAccount: { name: 'mail-account', quota: 3, windowSeconds: 15 * MINUTE },
  mailAddress: { name: 'mail-address', quota: 20, windowSeconds: 15 * MINUTE },
  linkAddress: { name: 'link-address', quota: 30, windowSeconds: 15 * MINUTE },
  tokenMaking: { name: 'token-making', quota: 20, windowSeconds: 60 * MINUTE },
  badTokenAddress: { name: 'bad-token-address', quota: 30, windowSeconds: 5 * MINUTE },
  rollUps: { name: 'roll-ups', quota: 60, windowSeconds: MINUTE },
  api: { name: 'api', quota: 600, windowSeconds: MINUTE },
} as const satisfies Record<string, RatePolicy>;
