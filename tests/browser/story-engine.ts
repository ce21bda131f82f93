import { Readable } from 'node:stream';
import { declarationsFromBody, listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { readMassList } from '@/lib/ingest/mass-list';
import { readOperatingPoints } from '@/lib/ingest/operating-points';
import { readRotors } from '@/lib/ingest/rotors';
import { type ConfigurationResult, evaluateConfiguration } from '@/lib/loading/configuration';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { Placement } from '@/lib/mass/place';
import { NO_GROWTH } from '@/lib/mass/roll-up';
import { SubtotalBook } from '@/lib/mass/subtotals';
import { UncertaintyBook } from '@/lib/mass/uncertainty/book';
import { BOX, FRAME, LIST_DECLARATIONS, POINTS, ROTOR_INERTIA_UNIT, ROTORS } from './story-inputs';

const bytes = (text: string) => Readable.from([Buffer.from(text)]);

const GEOMETRY: AirframeGeometry = {
  axes: ['aft', 'right', 'up'],
  lateralPlane: 0,
  incidence: (FRAME.incidence * Math.PI) / 180,
  reference: [FRAME.lemac[0] + FRAME.mac / 4, FRAME.lemac[1], FRAME.lemac[2]],
  lemac: FRAME.lemac,
  mac: FRAME.mac,
  span: FRAME.span,
  length: FRAME.length,
};

/** What the engine makes of the story's files, without server, database or queue: both conditions and both operating points. */
export async function engineSays(list: string): Promise<ConfigurationResult> {
  const declarations = declarationsFromBody(listDeclarationsSchema.parse(LIST_DECLARATIONS));
  const placement = new Placement(declarations, GEOMETRY);
  const [book, uncertainty] = [new SubtotalBook(placement), new UncertaintyBook(placement)];
  const reading = await readMassList(bytes(list), declarations, {
    onComponent(component) {
      book.add(component);
      uncertainty.add(component);
    },
  });
  const rotating = await readRotors(bytes(ROTORS), { inertiaUnit: ROTOR_INERTIA_UNIT });
  const operating = await readOperatingPoints(bytes(POINTS));
  const wrong = [reading, rotating, operating].flatMap(({ problems }) => problems);
  if (wrong.length > 0) throw new Error(wrong.map(({ message }) => message).join('\n'));
  const sums = uncertainty.sums();
  const box = { name: BOX.name, mass: Number(BOX.mass), position: placeOfBox() };
  return evaluateConfiguration({
    geometry: GEOMETRY,
    allowances: NO_GROWTH,
    subtotals: book.subtotals().map((subtotal, index) => {
      const own = sums[index];
      if (own === undefined) throw new Error('every subtotal has its uncertainty');
      return { ...subtotal, uncertainty: own };
    }),
    conditions: [
      { code: 'empty', title: 'Empty aircraft', categories: ['empty'], items: [] },
      { code: 'ferry', title: 'Ferry with spares', categories: ['empty'], items: [box] },
    ],
    rotors: rotating.rotors,
    points: operating.points,
  });
}

const placeOfBox = () => [Number(BOX.x), Number(BOX.y), Number(BOX.z)] as const;

/** The members of the contract that an answer of the API must have, as they come out of JSON. */
export function membersOf(result: ConfigurationResult): unknown {
  return asJson({
    conditions: result.conditions.map(({ code, title, rollUp: { basic, predicted }, uncertainty }) => {
      const [now, grown] = [basic.properties, predicted.properties];
      if (now === null || grown === null) throw new Error('the story has mass');
      const { ixx, iyy, izz, ixy, ixz, iyz } = now.inertia;
      return {
        code,
        title,
        basis: 'basic',
        mass: basic.mass,
        predictedMass: predicted.mass,
        cg: { airframe: named(now.cg), percentMac: now.percentMac },
        inertia: {
          ...now.inertia,
          tensor: [
            [ixx, -ixy, -ixz],
            [-ixy, iyy, -iyz],
            [-ixz, -iyz, izz],
          ],
        },
        principal: now.principal,
        radiiOfGyration: now.radii,
        sigma: { mass: uncertainty.basic.mass },
        predicted: {
          mass: predicted.mass,
          cg: { airframe: named(grown.cg), percentMac: grown.percentMac },
          inertia: grown.inertia,
        },
      };
    }),
    operatingPoints: result.operatingPoints.map(({ code, momentum: { total, gyroMatrix, rotors } }) => ({
      code,
      angularMomentum: { hx: total[0], hy: total[1], hz: total[2] },
      gyroMatrix,
      rotors: rotors.map(({ rotor, momentum }) => ({
        rotor,
        hx: momentum[0],
        hy: momentum[1],
        hz: momentum[2],
      })),
    })),
  });
}

const named = ([x, y, z]: readonly [number, number, number]) => ({ x, y, z });

/** JSON has no minus zero. */
const asJson = (value: unknown): unknown => JSON.parse(JSON.stringify(value));
