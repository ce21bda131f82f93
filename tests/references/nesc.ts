/*
 * NASA Engineering and Safety Center check-cases: NASA/TM-2015-218675 (Murri, Jackson, Shelton 2015). The models were read in
 * github.com/nasa/simupy-flight at 70754e6916afc206e8c0abb386d1a9c98bf8f561, folder NESC_data/All_models. Products there are
 * positive integrals in body axes (ANSI/AIAA S-119).
 */

/** A1. brick_inertia.dml, 2012-10-04: slug, slug.ft2. Printed to seven digits. */
export const brick = {
  massSlug: 0.155404754,
  inertia: { ixx: 0.00189422, iyy: 0.006211019, izz: 0.007194665, ixy: 0, ixz: 0, iyz: 0 },
  /** The brick of the check-case: 5 lb; x, y, z edges in inches. */
  massPounds: 5,
  edgesInches: [8, 4, 2.25],
} as const;

/** A5. F16_inertia.dml, 2012-08-07, after Stevens and Lewis, 2nd edition: slug, slug.ft2, ft. */
export const f16 = {
  massSlug: 637.1595,
  weightPounds: 20500,
  inertia: { ixx: 9496, iyy: 55814, izz: 63100, ixy: 0, ixz: 982, iyz: 0 },
  chordFeet: 11.32,
  momentReferencePercent: 35,
  testCgPercent: 25,
  /** How far ahead of the moment reference the CG then is. */
  forwardFeet: 1.132,
} as const;

/**
 * A6. cannonball_inertia.dml, 2012-10-04: one slug, 6 in across. PUBLISHED UNIT ERROR: 3.6 is 2/5 m r2 in slug.in2, entered as
 * slug.ft2, where 0.025 would be right.
 */
export const cannonball = {
  massSlug: 1,
  radiusInches: 3,
  publishedMoment: 3.6,
  publishedUnit: 'slug.ft2',
  rightUnit: 'slug.in2',
  rightMoment: 0.025,
} as const;

/** A8. orbital_cylinder_inertia.dml, 2014-09-15: kg, kg.m2. A solid cylinder of radius 1 m and length 12 m. */
export const orbitalCylinder = {
  mass: 1000,
  radius: 1,
  length: 12,
  inertia: { ixx: 500, iyy: 12250, izz: 12250, ixy: 0, ixz: 0, iyz: 0 },
} as const;

/**
 * A10. README.html of the two-stage package, v2, 2014-03-30 (Jackson; data of Queen 2013): kg, m, x aft of the nose. Stages are solid
 * cylinders of radius 1.5 m. The payload is a point at the nose, but counts with Ixx = m r2/2 and no other moment (found by
 * recomputing A11): no body is like that.
 */
export const rocket = {
  radius: 1.5,
  stage1: { from: 10, to: 35, dry: 35000, propellant: 180000 },
  stage2: { from: 0, to: 10, dry: 15000, propellant: 80000 },
  payload: { mass: 4000, x: 0, ixx: 4500 },
} as const;

/**
 * A11. twostage_inertia.dml, 2013-08-09: mass kg, CG m aft of the nose, Ixx, Iyy = Izz kg.m2 about the CG. PUBLISHED DIGIT ERROR:
 * the Iyy of S1Burnout is printed 10886636.572139, one too high in the seventh digit; the model gives 10886635.572139.
 */
export const rocketRolledUp = [
  { name: 'Liftoff', mass: 314000, cg: 16.91879, ixx: 353250, iyy: 33501637.473461, slip: 0 },
  { name: 'S1Burnout', mass: 134000, cg: 9.421642, ixx: 150750, iyy: 10886636.572139, slip: 1 },
  { name: 'S2Ignite', mass: 99000, cg: 4.79798, ixx: 111375, iyy: 941063.762626, slip: 0 },
  { name: 'S2Burnout', mass: 19000, cg: 3.947368, ixx: 21375, iyy: 212384.868421, slip: 0 },
] as const;
