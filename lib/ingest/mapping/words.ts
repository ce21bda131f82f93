import { type ListColumn } from '@/lib/ingest/mass-list/columns';

/*
 * What people call the columns of a mass list: words of the trade and plain ones, a closed list. Names are as `nameOf` makes them.
 * Common practice, no source.
 */

export interface NameMatch {
  readonly column: ListColumn;
  /** 1: the very name; less: it could also be something else, so it is asked. */
  readonly weight: number;
  /** The figure is of all pieces of a row together. */
  readonly allPieces: boolean;
}

const ALONG: readonly string[] = [
  'station',
  'sta',
  'fs',
  'fus sta',
  'fuselage station',
  'body station',
  'arm',
  'long arm',
  'longitudinal arm',
  'lcg',
  'stations',
];
const ACROSS: readonly string[] = ['butt line', 'buttline', 'butt', 'bl', 'lateral arm', 'tcg', 'butt lines'];
const UPWARD: readonly string[] = ['water line', 'waterline', 'wl', 'vertical arm', 'vcg', 'waterlines'];

const NAMES: Readonly<Partial<Record<ListColumn, readonly string[]>>> = {
  item: [
    'item',
    'item no',
    'item number',
    'item id',
    'item code',
    'line item',
    'line no',
    'id',
    'key',
    'tag',
    'tag no',
    'component id',
    'find no',
    'index no',
    'no',
    'pos',
    'pos no',
  ],
  part_number: [
    'part number',
    'part no',
    'part num',
    'partnumber',
    'part',
    'pn',
    'p n',
    'part id',
    'drawing',
    'drawing no',
    'drawing number',
    'dwg',
    'dwg no',
  ],
  part_revision: ['part revision', 'part rev', 'rev', 'revision', 'issue', 'iss'],
  description: [
    'description',
    'desc',
    'descr',
    'name',
    'component',
    'component name',
    'part name',
    'part description',
    'item description',
    'item name',
    'title',
    'nomenclature',
    'designation',
  ],
  group: [
    'group',
    'group name',
    'weight group',
    'mass group',
    'major group',
    'system',
    'section',
    'assembly group',
  ],
  category: ['category'],
  parent: ['parent', 'parent item', 'parent id', 'next assembly', 'next higher assembly', 'nha'],
  counting: ['counting'],
  quantity: [
    'quantity',
    'qty',
    'q ty',
    'count',
    'no off',
    'number off',
    'off',
    'pieces',
    'pcs',
    'no of pieces',
    'number of',
    'no of',
  ],
  mass: [
    'mass',
    'weight',
    'wt',
    'unit mass',
    'unit weight',
    'unit wt',
    'mass each',
    'weight each',
    'wt each',
    'each mass',
    'piece mass',
    'mass per piece',
    'weight per piece',
    'mass unit',
  ],
  x: ['x', ...ALONG],
  y: ['y', ...ACROSS],
  z: ['z', ...UPWARD],
  yaw: ['yaw', 'psi', 'yaw angle'],
  pitch: ['pitch', 'theta', 'pitch angle'],
  roll: ['roll', 'phi', 'roll angle'],
  symmetry: ['symmetry', 'sym', 'mirror', 'mirrored'],
  maturity: ['maturity', 'e c a', 'eca', 'maturity code', 'mass maturity', 'weight status'],
  growth_percent: [
    'growth percent',
    'growth',
    'mga',
    'mass growth',
    'growth allowance',
    'mass growth allowance',
    'contingency',
  ],
  source: ['source', 'data source', 'evidence', 'source document', 'reference document', 'ref doc'],
  source_date: ['source date', 'date', 'dated', 'date of source', 'weighed on'],
  note: ['note', 'notes', 'remark', 'remarks', 'comment', 'comments'],
  change_ref: ['change ref', 'change', 'change no', 'change number', 'change request'],
};

/** Names that are met for this and for other things. */
const DOUBTFUL: Readonly<Record<string, ListColumn>> = {
  m: 'mass',
  w: 'mass',
  ref: 'item',
  'ref no': 'item',
  reference: 'source',
  line: 'item',
  assembly: 'group',
  subsystem: 'group',
  type: 'category',
  units: 'quantity',
  ea: 'quantity',
  longitudinal: 'x',
  lateral: 'y',
  vertical: 'z',
  height: 'z',
  length: 'x',
  basis: 'maturity',
  margin: 'growth_percent',
  status: 'maturity',
  symmetrical: 'symmetry',
  pair: 'symmetry',
};

const ALL_PIECES: readonly string[] = [
  'total mass',
  'total weight',
  'total wt',
  'tot mass',
  'tot wt',
  'mass total',
  'weight total',
  'extended mass',
  'extended weight',
  'ext mass',
  'ext wt',
  'sum mass',
  'row mass',
];
const AXIS_PAIRS: Readonly<Record<string, ListColumn>> = {
  xx: 'ixx',
  yy: 'iyy',
  zz: 'izz',
  xy: 'ixy',
  yx: 'ixy',
  xz: 'ixz',
  zx: 'ixz',
  yz: 'iyz',
  zy: 'iyz',
};
/** What says only that the figure is about the part's own CG. */
const BESIDES = new Set([
  'cg',
  'cog',
  'own',
  'local',
  'centroidal',
  'about',
  'at',
  'of',
  'the',
  'centre',
  'center',
  'gravity',
  'centroid',
  'coord',
  'coordinate',
  'location',
  'position',
  'pos',
  'bar',
  'axis',
]);

const BY_NAME = new Map<string, ListColumn>(
  Object.entries(NAMES).flatMap(([column, names]) =>
    names.map((name): [string, ListColumn] => [name, column as ListColumn]),
  ),
);

/** The contract column that a heading's name stands for, or null. */
export function columnNamed(name: string): NameMatch | null {
  const sure = (column: ListColumn): NameMatch => ({ column, weight: 1, allPieces: false });
  const plain = BY_NAME.get(name) ?? inertiaNamed(name) ?? placeNamed(name) ?? sigmaNamed(name);
  if (plain !== undefined) return sure(plain);
  if (ALL_PIECES.includes(name)) return { column: 'mass', weight: 0.9, allPieces: true };
  const doubtful = Object.hasOwn(DOUBTFUL, name) ? DOUBTFUL[name] : undefined;
  if (doubtful !== undefined) return { column: doubtful, weight: 0.5, allPieces: false };
  const word = name
    .split(' ')
    .map((one) => BY_NAME.get(one))
    .find(
      (column) =>
        column === 'mass' || column === 'description' || column === 'quantity' || column === 'part_number',
    );
  return word === undefined || isMoment(name) ? null : { column: word, weight: 0.4, allPieces: false };
}

/** First moments: mass times arm. The product computes them, so they are no column of the contract. */
export function isMoment(name: string): boolean {
  return /\b(?:moment|mom|mx|my|mz|wx|wy|wz)\b/u.test(name) && !/inertia/u.test(name);
}

/** "ixx", "i xx", "jxy", "moment of inertia xx", "product of inertia xz", "ioxx", "xx", "i x". */
function inertiaNamed(name: string): ListColumn | undefined {
  const words = name.split(' ').filter((word) => !BESIDES.has(word));
  const text = words
    .join(' ')
    .replace(/\b(?:mass )?(?:moments?|products?) inertia\b/u, 'i')
    .replace(/\binertia\b/u, 'i')
    .replace(/\b(?:roll) i\b/u, 'ixx')
    .replace(/\bpitch i\b/u, 'iyy')
    .replace(/\byaw i\b/u, 'izz');
  const pair = /^(?:[ijp][o0]? ?)?([xyz]{2})$/u.exec(text)?.[1];
  if (pair !== undefined) return AXIS_PAIRS[pair];
  const single = /^(?:i[o0]? ?([xyz])|([xyz]) i)$/u.exec(text);
  const axis = single?.[1] ?? single?.[2];
  return axis === undefined ? undefined : AXIS_PAIRS[axis + axis];
}

/** "x cg", "cg x", "xcg", "x arm", "cgx", "x bar", "x location". */
function placeNamed(name: string): ListColumn | undefined {
  const words = name
    .replace(/\b([xyz])(?:cg|cog|bar)\b|\b(?:cg|cog)([xyz])\b/gu, '$1$2')
    .split(' ')
    .filter((word) => !BESIDES.has(word) && word !== 'arm');
  const [only, ...more] = words;
  return more.length === 0 && (only === 'x' || only === 'y' || only === 'z') ? only : undefined;
}

const SIGMA_WORDS = new Set(['sigma', 'uncertainty', 'unc', 'std', 'sd', 'deviation', 'standard']);

function sigmaNamed(name: string): ListColumn | undefined {
  const words = name.split(' ');
  const rest = words.filter((word) => !SIGMA_WORDS.has(word));
  if (rest.length === words.length || rest.length === 0) return undefined;
  const value = BY_NAME.get(rest.join(' ')) ?? inertiaNamed(rest.join(' ')) ?? placeNamed(rest.join(' '));
  switch (value) {
    case 'mass':
    case 'x':
    case 'y':
    case 'z':
    case 'ixx':
    case 'iyy':
    case 'izz':
    case 'ixy':
    case 'ixz':
    case 'iyz':
      return `${value}_sigma`;
    default:
      return undefined;
  }
}
