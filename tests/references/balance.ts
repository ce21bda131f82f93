/*
 * D. Worked examples of weight and balance, lb and in. Printed results are rounded; `exact` is the same arithmetic unrounded, worked outside
 * this project. They check first moments: masses, arms, what is added, moved and taken away.
 */

/** D4. 100 lb moved from station 30 to 150 in an aircraft of 8000 lb with a moment of 616 000 lb.in. FAA-H-8083-25, in flightlearnings.com (2011/03/21): read there. */
export const SHIFT = { weight: 8000, moment: 616_000, moved: 100, from: 30, to: 150, cg: 78.5 } as const;

/** D5. 7800 lb at 81.5: 65 lb moved from 150 to 30 bring the CG to 80.5. The same handbook, quoted in jetcareers.com thread 151008: read there. */
export const SHIFT_TO_LIMIT = { weight: 7800, cg: 81.5, from: 150, to: 30, moved: 65, limit: 80.5 } as const;

/**
 * D6, D7, D12. What added at an arm brings the CG to a limit. FAA test bank in jetcareers.com thread 72797 and in
 * aircraftweightandbal.passetra.com: read there. D12: flight-study.com (2021/11) has the first two numbers; limit, station and result are from
 * memory.
 */
export const ADDED_TO_LIMIT = [
  { name: 'D6', weight: 2900, cg: 115.0, arm: 130, limit: 116.0, added: 207.1, exact: 207.142857 },
  { name: 'D7', weight: 4954, cg: 30.5, arm: 162, limit: 32.0, added: 57.16, exact: 57.161538 },
  { name: 'D12', weight: 1876, cg: 32.2, arm: 228, limit: 33.0, added: 7.7, exact: 7.69641 },
] as const;

/** D8. An alteration: one removal and three additions. aircraftweightandbal.passetra.com: read there. */
export const ALTERATION = {
  weight: 2886,
  moment: 101_673.78,
  changes: [
    [-30, 71],
    [97, 71],
    [20, 71],
    [30, 94],
  ],
  newWeight: 3003,
  newMoment: 110_670.78,
  cg: 36.85,
  exact: 36.853407,
} as const;
