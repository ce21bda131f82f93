/*
 * Published tensors of whole aircraft: lb, slug.ft2, body axes; Ixz a positive integral where the source states its sign.
 * Each was read in the place named beside it; none is from memory.
 */

export interface PublishedAircraft {
  readonly name: string;
  readonly weight: number;
  readonly ixx: number;
  readonly iyy: number;
  readonly izz: number;
  readonly ixz: number;
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
    source: 'F16_inertia.dml, NASA/TM-2015-218675 (github.com/nasa/simupy-flight)',
  },
  {
    name: '747-100, cruise',
    weight: 636636,
    ixx: 18.2e6,
    iyy: 33.1e6,
    izz: 49.7e6,
    ixz: 0.97e6,
    source: 'JSBSim B747.xml; weight in the notes of Caughey after Heffley, NASA CR-2144',
  },
  {
    name: '747, power approach',
    weight: 564000,
    ixx: 13.7e6,
    iyy: 30.5e6,
    izz: 43.1e6,
    ixz: 0.83e6,
    source: 'as Roskam, appendix B, in a public repository',
  },
  {
    name: 'A-4D, flight condition 1',
    weight: 17578,
    ixx: 8780,
    iyy: 25900,
    izz: 28500,
    ixz: -4070,
    source: 'Teper, NASA CR-96008 (1969), table III-A',
  },
  {
    name: 'A-7A, flight condition 1',
    weight: 21889,
    ixx: 13635,
    iyy: 58966,
    izz: 67560,
    ixz: 2933,
    source: 'Teper, NASA CR-96008 (1969), table II-A, back-converted from SI',
  },
  {
    name: 'F-4C, power approach',
    weight: 33196,
    ixx: 23668,
    iyy: 117500,
    izz: 133723,
    ixz: 2177,
    source: 'NASA CR-2144, figure IV-1',
  },
  { name: 'F-104A', weight: 14126, ixx: 3450, iyy: 55800, izz: 56800, ixz: 0, source: 'as NASA CR-2144' },
  {
    name: 'DC-8',
    weight: 190000,
    ixx: 3.09e6,
    iyy: 2.94e6,
    izz: 5.58e6,
    ixz: 28000,
    source: 'as NASA CR-96008',
  },
  {
    name: 'Navion',
    weight: 2750,
    ixx: 1048,
    iyy: 3000,
    izz: 3530,
    ixz: 0,
    source: 'NASA CR-96008, section X',
  },
  {
    name: 'X-15, burnt out',
    weight: 15560,
    ixx: 3650,
    iyy: 80000,
    izz: 82000,
    ixz: 590,
    source: 'JSBSim X15.xml',
  },
  {
    name: 'UH-60A',
    weight: 16400,
    ixx: 5629,
    iyy: 40000,
    izz: 37200,
    ixz: 1670,
    source: 'Hilbert, NASA TM-85890 (1984), table 1',
  },
  {
    name: 'GTM T2, 5.5 per cent scale',
    weight: 57.75,
    ixx: 1.221,
    iyy: 4.655,
    izz: 5.587,
    ixz: 0.274,
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
