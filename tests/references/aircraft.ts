/*
 * Published tensors of whole aircraft: lb, slug.ft2, body axes; Ixz a positive integral where the source states its sign.
 * Each was read in the place named beside it, but for the lengths, which are from memory and say so.
 */

export interface PublishedAircraft {
  readonly name: string;
  readonly weight: number;
  readonly ixx: number;
  readonly iyy: number;
  readonly izz: number;
  readonly ixz: number;
  /** ft; null for a helicopter. */
  readonly span: number | null;
  /** ft. FROM MEMORY, unverified: for plausibility only. */
  readonly length: number;
  readonly source: string;
}

export const PUBLISHED: readonly PublishedAircraft[] = [
  {
    name: 'F-16',
    weight: 20500,
    ixx: 9496,
    iyy: 55814,
    izz: 63100,
    ixz: 982,
    span: 30.0,
    length: 49.5,
    source: 'F16_inertia.dml, NASA/TM-2015-218675 (github.com/nasa/simupy-flight)',
  },
  {
    name: '747-100, cruise',
    weight: 636636,
    ixx: 18.2e6,
    iyy: 33.1e6,
    izz: 49.7e6,
    ixz: 0.97e6,
    span: 195.7,
    length: 225.2,
    source: 'JSBSim B747.xml; weight in the notes of Caughey after Heffley, NASA CR-2144',
  },
  {
    name: '747, power approach',
    weight: 564000,
    ixx: 13.7e6,
    iyy: 30.5e6,
    izz: 43.1e6,
    ixz: 0.83e6,
    span: 196.0,
    length: 225.2,
    source: 'as Roskam, appendix B, in a public repository',
  },
  {
    name: 'A-4D, flight condition 1',
    weight: 17578,
    ixx: 8780,
    iyy: 25900,
    izz: 28500,
    ixz: -4070,
    span: 27.5,
    length: 38.4,
    source: 'Teper, NASA CR-96008 (1969), table III-A',
  },
  {
    name: 'A-7A, flight condition 1',
    weight: 21889,
    ixx: 13635,
    iyy: 58966,
    izz: 67560,
    ixz: 2933,
    span: 38.7,
    length: 46.1,
    source: 'Teper, NASA CR-96008 (1969), table II-A, back-converted from SI',
  },
  {
    name: 'F-4C, power approach',
    weight: 33196,
    ixx: 23668,
    iyy: 117500,
    izz: 133723,
    ixz: 2177,
    span: 38.7,
    length: 58.2,
    source: 'NASA CR-2144, figure IV-1',
  },
  {
    name: 'F-104A',
    weight: 14126,
    ixx: 3450,
    iyy: 55800,
    izz: 56800,
    ixz: 0,
    span: 21.94,
    length: 54.8,
    source: 'as NASA CR-2144',
  },
  {
    name: 'DC-8',
    weight: 190000,
    ixx: 3.09e6,
    iyy: 2.94e6,
    izz: 5.58e6,
    ixz: 28000,
    span: 142.3,
    length: 150.5,
    source: 'as NASA CR-96008',
  },
  {
    name: 'Navion',
    weight: 2750,
    ixx: 1048,
    iyy: 3000,
    izz: 3530,
    ixz: 0,
    span: 33.4,
    length: 27.5,
    source: 'NASA CR-96008, section X',
  },
  {
    name: 'Cessna 172',
    // From memory, unverified.
    weight: 2645,
    ixx: 948,
    iyy: 1346,
    izz: 1967,
    ixz: 0,
    span: 36.0,
    length: 27.2,
    source: 'JSBSim c172p.xml, after Roskam; weight from memory, unverified',
  },
  {
    name: 'X-15, burnt out',
    weight: 15560,
    ixx: 3650,
    iyy: 80000,
    izz: 82000,
    ixz: 590,
    span: 22.36,
    length: 50.0,
    source: 'JSBSim X15.xml',
  },
  {
    name: 'UH-60A',
    weight: 16400,
    ixx: 5629,
    iyy: 40000,
    izz: 37200,
    ixz: 1670,
    span: null,
    length: 50.1,
    source: 'Hilbert, NASA TM-85890 (1984), table 1',
  },
  {
    name: 'GTM T2, 5.5 per cent scale',
    weight: 57.75,
    ixx: 1.221,
    iyy: 4.655,
    izz: 5.587,
    ixz: 0.274,
    span: 6.8488,
    length: 8.5,
    source: 'github.com/nasa/GTM_DesignSim gtm_design/config/AC_baseparams_T2.m',
  },
];

/** Published sets that no body can have: Ixx + Iyy < Izz. slug.ft2. */
export const IMPOSSIBLE = [
  {
    name: 'Cessna 310',
    ixx: 8884,
    iyy: 1939,
    izz: 11001,
    // B3
    source: 'JSBSim aircraft/c310/c310.xml at 0b688c801c52d800f75d5c41e5434ce5d7618e88, after Roskam',
  },
  {
    name: 'F-105B',
    ixx: 12600,
    iyy: 140000,
    izz: 177000,
    source: 'as transcribed in a public repository from NASA CR-96008; the primary was not read',
  },
] as const;

/** B1. Engine angular momentum of the F-16, slug.ft2/s along +x body. Source: Stevens and Lewis, after NASA TP-1538 (1979). */
export const F16_ENGINE_MOMENTUM = 160;

/**
 * F8. The F-16 of JSBSim: its file states ixz = -982 slug.ft2 with negated products, in structural axes (aft, right, up); in body axes that is the
 * positive integral +982. Source: JSBSim src/models/FGMassBalance.h and aircraft/f16/f16.xml. Status: the header was read.
 */
export const JSBSIM_F16 = { ixx: 9496, iyy: 55814, izz: 63100, ixz: -982, bodyIxz: 982 } as const;

/** B4. Izz below Iyy: possible, and implausible for an aeroplane. slug.ft2. Source: JSBSim T38.xml and F4N.xml. */
export const IZZ_BELOW_IYY = [
  { name: 'T-38', ixx: 7806, iyy: 36075, izz: 31319 },
  { name: 'F-4N', ixx: 35698, iyy: 132077, izz: 124386 },
] as const;

/**
 * B5. Saab J35, empty and loaded: kg, kg.m2. Ixz in the file's geometry axes; the file notes that it changes sign in those of flight
 * mechanics. Source: j35mass.m in github.com/bergercookie/Flight-Mechanics.
 */
export const J35 = [
  { name: 'empty', mass: 8180, ixx: 10916, iyy: 68438, izz: 77072, ixz: -2596 },
  { name: 'loaded', mass: 10000, ixx: 13050, iyy: 75300, izz: 86200, ixz: -2520 },
] as const;

/** B6. Student data of a JAS 39 that cannot be: kg, kg.m2, m. Source: github.com/Ftps/CVooProj gripen.sci. */
export const JAS39 = { mass: 10049, ixx: 1434311, iyy: 65079, izz: 1385502, span: 8.382 } as const;

/**
 * A6. The NESC cannonball: slug, in, slug.ft2. 3.6 is 2/5 m r² in slug.in2 entered as slug.ft2; right is 0.025. Source:
 * cannonball_inertia.dml of 2012-10-04 (github.com/nasa/simupy-flight).
 */
export const NESC_SPHERE = { mass: 1, diameter: 6, published: 3.6, right: 0.025 } as const;

/**
 * K2. Non-dimensional radii Rx, Ry, Rz by class. Source: Raymer, Aircraft Design: A Conceptual Approach, table 16.1; FROM MEMORY,
 * unverified. Its military jet trainer (0.22, 0.14, 0.25) is left out as implausible.
 */
export const CLASS_RADII = [
  ['single-engine propeller', 0.25, 0.38, 0.39],
  ['twin propeller', 0.34, 0.29, 0.44],
  ['business jet, twin', 0.3, 0.3, 0.43],
  ['twin turboprop transport', 0.22, 0.34, 0.38],
  ['jet transport, engines at the fuselage', 0.24, 0.34, 0.42],
  ['jet transport, two engines at the wing', 0.23, 0.33, 0.45],
  ['jet transport, four engines at the wing', 0.31, 0.33, 0.45],
  ['jet fighter', 0.23, 0.38, 0.52],
  ['jet heavy bomber', 0.34, 0.31, 0.47],
  ['flying wing', 0.32, 0.32, 0.46],
  ['flying boat', 0.25, 0.32, 0.41],
] as const;
