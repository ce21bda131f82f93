import { type Vec3 } from '@/lib/numerics/vec3';

/*
 * C1. Closed-form moments of uniform solids about their CG, axis x first, per unit of mass.
 * Source: any handbook of mechanics. Status: from memory; box and cylinder agree with the NASA models in nesc.ts.
 */

type Diagonal = Vec3;

export const box = (a: number, b: number, c: number): Diagonal => [
  (b ** 2 + c ** 2) / 12,
  (a ** 2 + c ** 2) / 12,
  (a ** 2 + b ** 2) / 12,
];

export const solidCylinder = (r: number, l: number): Diagonal => {
  const across = (3 * r ** 2 + l ** 2) / 12;
  return [r ** 2 / 2, across, across];
};

export const hollowCylinder = (ri: number, ro: number, l: number): Diagonal => {
  const across = (3 * (ri ** 2 + ro ** 2) + l ** 2) / 12;
  return [(ri ** 2 + ro ** 2) / 2, across, across];
};

export const solidSphere = (r: number): Diagonal => [0.4 * r ** 2, 0.4 * r ** 2, 0.4 * r ** 2];

export const hollowSphere = (ri: number, ro: number): Diagonal => {
  const k = (0.4 * (ro ** 5 - ri ** 5)) / (ro ** 3 - ri ** 3);
  return [k, k, k];
};

/** A tube of no thickness, open at both ends. */
export const thinTube = (r: number, l: number): Diagonal => {
  const across = (6 * r ** 2 + l ** 2) / 12;
  return [r ** 2, across, across];
};

export const thinSphere = (r: number): Diagonal => {
  const k = (2 / 3) * r ** 2;
  return [k, k, k];
};

/** Without its base; CG h/3 from the base. */
export const thinCone = (r: number, h: number): Diagonal => {
  const across = r ** 2 / 4 + h ** 2 / 18;
  return [r ** 2 / 2, across, across];
};

/** A full ring, R to the middle of its section of radius r. */
export const torus = (R: number, r: number): Diagonal => {
  const across = R ** 2 / 2 + (5 / 8) * r ** 2;
  return [R ** 2 + (3 / 4) * r ** 2, across, across];
};

/** Across x, b along y and c along z. */
export const thinPlate = (b: number, c: number): Diagonal => [
  (b ** 2 + c ** 2) / 12,
  c ** 2 / 12,
  b ** 2 / 12,
];

/** CG h/4 from the base. */
export const solidCone = (r: number, h: number): Diagonal => {
  const across = (3 / 80) * (4 * r ** 2 + h ** 2);
  return [0.3 * r ** 2, across, across];
};

/** CG 3r/8 from the flat face. */
export const hemisphere = (r: number): Diagonal => [0.4 * r ** 2, (83 / 320) * r ** 2, (83 / 320) * r ** 2];

export const thinRod = (l: number): Diagonal => [0, l ** 2 / 12, l ** 2 / 12];

export const thinDisc = (r: number): Diagonal => [r ** 2 / 2, r ** 2 / 4, r ** 2 / 4];

export const ellipsoid = (a: number, b: number, c: number): Diagonal => [
  (b ** 2 + c ** 2) / 5,
  (a ** 2 + c ** 2) / 5,
  (a ** 2 + b ** 2) / 5,
];

/** Thin elliptic disc of half-axes b along y and c along z. */
export const thinEllipse = (b: number, c: number): Diagonal => [
  (b ** 2 + c ** 2) / 4,
  c ** 2 / 4,
  b ** 2 / 4,
];

/**
 * C2. Cube of mass M and side s about a corner, in M s2, as TENSOR elements.
 * Source: UCSD Physics 110B notes (Branson), node 28; University of Colorado PHYS 3210. Status: read there.
 */
export const cubeCorner = {
  diagonal: 2 / 3,
  offDiagonal: -1 / 4,
  principal: [1 / 6, 11 / 12, 11 / 12],
  leastAxis: [1 / Math.sqrt(3), 1 / Math.sqrt(3), 1 / Math.sqrt(3)],
} as const;

/**
 * C4. Rod of 2.5 kg and 0.75 m, kg.m2.
 * Source: Young and Freedman, University Physics, 13th edition, chapter 9, problem 31. Status: read in a stored copy of the answer.
 */
export const rod = { mass: 2.5, length: 0.75, aboutEnd: 0.469, aboutCentre: 0.117 } as const;

/**
 * C5. Rod of 2 kg and 0.5 m with a sphere of 1 kg and radius 0.2 m at its end, about the other end, kg.m2.
 * Source: OpenStax, University Physics volume 1, section 10.5. Status: from memory; the printed value recomputes.
 */
export const rodAndSphere = {
  rod: { mass: 2, length: 0.5 },
  sphere: { mass: 1, radius: 0.2 },
  aboutEnd: 0.673,
} as const;

/**
 * C6. Three bodies with full tensors, one of them turned. kg, m, kg.m2; tensors as TENSOR elements xx yy zz xy xz yz.
 * Source: made for this project and worked by two independent engines (PyKDL 1.5.1 agrees to 3e-15; MuJoCo gives the same mass,
 * moment and 11.575). Status: computed there, not by the code under test.
 */
export const threeBodies = {
  bodies: [
    { mass: 10, place: [1, 0.5, -0.2], tensor: [2, 3, 4, 0.1, -0.2, 0.3], yawDegrees: 0 },
    { mass: 5, place: [-2, 0.1, 0.4], tensor: [1, 1.5, 2, 0, 0.25, 0], yawDegrees: 30 },
    { mass: 2, place: [0.3, -1.2, 0.9], tensor: [0.2, 0.2, 0.1, 0, 0, 0], yawDegrees: 0 },
  ],
  mass: 17,
  cg: [0.0352941176470588, 0.182352941176471, 0.105882352941176],
  aboutCg: [
    10.819117647058826, 37.36323529411764, 41.12352941176471, -3.287094586240227, 5.540035762710815,
    3.713235294117648,
  ],
  aboutOrigin: [11.575, 37.575, 41.71, -3.39650635094611, 5.476506350946109, 3.385],
  principal: [9.294967160355998, 36.29669453186526, 43.71422066071992],
} as const;
