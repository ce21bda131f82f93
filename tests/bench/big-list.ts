import { randomNumbers } from '@/tests/support/random';

/** How the rows of a big list are written. */
export interface BigListShape {
  readonly rows: number;
  readonly seed: number;
  /** Every text in quotes, some with a doubled quote or a line end. */
  readonly quoted?: boolean;
  /** Yaw, pitch and roll on every third row. */
  readonly turned?: boolean;
  /** Ten standard uncertainties on every row instead of a few on some. */
  readonly uncertain?: boolean;
  /** The last row's mass is no number. */
  readonly spoiled?: boolean;
}

const HEADER = [
  'item,part_number,description,group,category,quantity,mass,x,y,z,ixx,iyy,izz,ixy,ixz,iyz',
  'symmetry,maturity,growth_percent,mass_sigma,x_sigma,y_sigma,z_sigma,source',
].join(',');
const TURNS = ',yaw,pitch,roll';
const MORE_SIGMAS = ',ixx_sigma,iyy_sigma,izz_sigma,ixy_sigma,ixz_sigma,iyz_sigma';

const SECTIONS = [
  'Wing',
  'Fuselage',
  'Empennage',
  'Landing gear',
  'Propulsion',
  'Systems',
  'Cabin',
  'Avionics',
];
const ZONES = ['Centre', 'Inner', 'Outer', 'Forward', 'Aft'];
const KINDS = ['Frames', 'Skins', 'Brackets', 'Fasteners', 'Harness'];
const NAMES = [
  'Rib',
  'Stringer',
  'Bracket',
  'Clip',
  'Panel',
  'Bolt',
  'Pipe run',
  'Duct',
  'Connector',
  'Angle',
];

interface Group {
  readonly path: string;
  readonly centre: readonly [number, number, number];
}

/** 200 paths of an invented aircraft, each with a place of its own. */
function groupsOf(random: () => number): Group[] {
  return SECTIONS.flatMap((section, s) =>
    ZONES.flatMap((zone, k) =>
      KINDS.map((kind) => ({
        path: `${section}/${zone}/${kind}`,
        centre: [4 + 1.5 * s + 0.6 * k, k % 2 === 0 ? 0 : 2 + k, 1 + 2 * random()] as const,
      })),
    ),
  );
}

/** Parts of a catalogue: one part number is one mass wherever it is used. */
function massOf(part: number): number {
  return Number((0.004 * 10 ** (((part * 7919) % 1000) / 300)).toPrecision(4));
}

const fixed = (value: number, digits: number): string => String(Number(value.toFixed(digits)));

/**
 * A component mass list in kg, m and kg.m2 as a large program has it: about 140 bytes a row, 200 groups, most parts from a catalogue,
 * a third with moments of a box, some with growth and uncertainties. Invented; the same bytes for the same shape.
 */
export function* bigListText(shape: BigListShape): Generator<string> {
  const random = randomNumbers(shape.seed);
  const groups = groupsOf(random);
  const { quoted = false, turned = false, uncertain = false } = shape;
  const put = (text: string): string => (quoted ? `"${text}"` : text);
  yield `${HEADER}${uncertain ? MORE_SIGMAS : ''}${turned ? TURNS : ''}\n`;
  let text = '';
  for (let row = 0; row < shape.rows; row += 1) {
    const group = groups[Math.floor((row * groups.length) / shape.rows)];
    if (group === undefined) throw new Error('a row without a group');
    const isOwn = random() < 0.4;
    const part = isOwn ? row : Math.floor(30000 * random() ** 2);
    const number = isOwn ? `SK40-${String(50000000 + row)}` : `SKN${String(1000 + part)}-${part % 9}`;
    const mass = massOf(part);
    const [x, y, z] = group.centre.map((each) => each + 2 * random() - 1) as [number, number, number];
    const isSided = y > 0.1 && random() < 0.15;
    const name = `${NAMES[part % NAMES.length] ?? ''} ${part % 997}${isSided ? ' RH' : ''}`;
    const description =
      quoted && row % 50 === 0
        ? `"${name}, ""A""\nsecond line"`
        : put(`${name}${quoted ? ', as drawn' : ' as drawn'}`);
    let moments = ',,,,,';
    if (random() < 0.35) {
      // A box of a few hundred kilograms a cubic metre, the same for every use of a part.
      const side = (mass / 400) ** (1 / 3);
      const [a, b, c] = [side * (1 + (part % 5)), side, side * (0.3 + (part % 3) / 4)];
      const k = mass / 12;
      const product = part % 3 === 0 ? (0.05 * k * a * b).toExponential(3) : '0';
      moments = `${[k * (b * b + c * c), k * (a * a + c * c), k * (a * a + b * b)]
        .map((each) => fixed(each, 7 - Math.floor(Math.log10(each)) - 4))
        .join(',')},${product},0,0`;
    }
    const lot = random();
    const maturity = lot < 0.5 ? 'C' : lot < 0.85 ? 'E' : 'A';
    const growth = lot < 0.2 ? '5' : '';
    const sigmas = uncertain
      ? `${fixed(mass / 50, 6)},0.01,0.01,0.02`
      : lot > 0.95
        ? `${fixed(mass / 50, 6)},0.01,0.01,0.01`
        : lot > 0.9
          ? `${fixed(mass / 50, 6)},,,`
          : ',,,';
    const bad = shape.spoiled === true && row === shape.rows - 1;
    text +=
      `${put(`W${String(1000000 + row)}`)},${put(number)},${description},${put(group.path)},` +
      `${random() < 0.03 ? 'operating' : 'empty'},${random() < 0.05 ? '4' : '1'},` +
      `${bad ? '1.2.3' : mass},${fixed(x, 4)},${fixed(y, 4)},${fixed(z, 4)},${moments},` +
      `,${maturity},${growth},${sigmas},${put('stress model 7')}`;
    if (uncertain) text += ',1e-6,1e-6,1e-6,1e-7,1e-7,1e-7';
    if (turned) text += row % 3 === 0 ? `,${Math.floor(360 * random())},12.5,-90` : ',,,';
    text += '\n';
    if (text.length > 100_000) {
      yield text;
      text = '';
    }
  }
  yield text;
}

/** The same as a stream of UTF-8 bytes. */
export async function* bigListBytes(shape: BigListShape): AsyncGenerator<Uint8Array> {
  const encoder = new TextEncoder();
  for (const text of bigListText(shape)) yield encoder.encode(text);
}
