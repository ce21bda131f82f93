/*
 * B7, B8. NASA GTM T2, removal of parts: lb; in; slug.ft2; x forward, y right, z down; products positive integrals.
 * Source: github.com/nasa/GTM_DesignSim at 9717143270144aca1f5d38d7c24c0fce678d1589, gtm_design/config: DamageModels_T2.m,
 * AC_baseparams_T2.m, AC_calcparams_T2.m. Each case gives the change of weight, CG and tensor, each tensor about its own CG.
 */

/** Tensor of the whole model. Ixy 0.006 is a CAD estimate. */
export const GTM_BASELINE = {
  /** MWS.wt_ref in AC_calcparams_T2.m: the weight that the cases belong to. */
  weight: 49.6,
  /** Gross weight in AC_baseparams_T2.m: the WRONG one for these cases. */
  grossWeight: 57.75,
  inertia: { ixx: 1.221, iyy: 4.655, izz: 5.587, ixy: 0.006, ixz: 0.274, iyz: 0 },
} as const;

export const GTM_REMOVALS = [
  {
    name: 'rudder off',
    weight: -0.13,
    cg: [0.126, 0, 0.028],
    change: { ixx: -0.00346, iyy: -0.06698, izz: -0.06352, ixy: 3e-5, ixz: -0.01409, iyz: 1e-5 },
  },
  {
    name: 'vertical tail off',
    weight: -1.31,
    cg: [1.166, 0, 0.277],
    change: { ixx: -0.03507, iyy: -0.57604, izz: -0.54102, ixy: 0.00024, ixz: -0.13113, iyz: 6e-5 },
  },
  {
    name: 'left outboard flap off',
    weight: -0.09,
    cg: [0.014, 0.041, 0.001],
    change: { ixx: -0.01018, iyy: -0.0012, izz: -0.01137, ixy: -0.00347, ixz: -9e-5, iyz: -0.00027 },
  },
] as const;

/** What the vertical tail must then be: place from the baseline CG, ft; own moments, slug.ft2. Status: worked out independently. */
export const GTM_VERTICAL_TAIL = {
  place: [-3.582, 0, -0.851],
  own: [0.00479, 0.00923, 0.00449],
} as const;

/**
 * B8. Balance of the model: ft, x forward of a datum ahead of the nose, so that stations are negative; the leading edge of the chord as a
 * distance aft. Source: AC_baseparams_T2.m and AC_calcparams_T2.m, as above.
 */
export const GTM_BALANCE = {
  cgFeet: [-4.74747447, -0.0118, -0.9761],
  leadingEdgeFeet: 4.5462,
  chordFeet: 0.9153,
  percent: 21.99,
} as const;
