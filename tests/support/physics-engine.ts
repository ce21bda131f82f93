import loadMujoco from 'mujoco-js';
import { z } from 'zod';

import { type Sym3 } from '@/lib/numerics/sym3';
import { type Vec3 } from '@/lib/numerics/vec3';

/*
 * MuJoCo (github.com/google-deepmind/mujoco, npm mujoco-js 0.0.7), a physics engine in double precision, as a second opinion on
 * compound bodies. Its documentation: "XML reference", elements compiler and inertial; "Computation", inertia of composite bodies
 * (mjData.crb: about the centre of mass of the kinematic tree, in world axes).
 */

/** A body as the engine is told of it. Its own tensor is in its own axes, about its own centre of mass. */
export interface EngineBody {
  readonly mass: number;
  readonly place: Vec3;
  /** Yaw, pitch, roll in rad, intrinsic: about z, the new y, the new x. */
  readonly turn: Vec3;
  /** The TENSOR's elements: off-diagonals are minus the products. Or three principal moments along the body's own axes. */
  readonly tensor: Sym3 | Vec3;
}

export interface Compound {
  readonly mass: number;
  readonly cg: Vec3;
  /** About the CG, as a tensor. */
  readonly tensor: Sym3;
}

function inertial({ mass, tensor }: EngineBody): string {
  // The order of fullinertia: M(1,1), M(2,2), M(3,3), M(1,2), M(1,3), M(2,3).
  const own =
    'xx' in tensor
      ? `fullinertia="${[tensor.xx, tensor.yy, tensor.zz, tensor.xy, tensor.xz, tensor.yz].join(' ')}"`
      : `diaginertia="${tensor.join(' ')}"`;
  return `<inertial pos="0 0 0" mass="${mass}" ${own}/>`;
}

/** Bodies without joints on a body that floats free: one rigid compound. The first carries the others and stands at the origin. */
function model([first, ...others]: readonly EngineBody[]): string {
  if (first === undefined) throw new RangeError('A compound needs a body.');
  const children = others.map(
    (body) =>
      `<body pos="${body.place.map((part, k) => part - (first.place[k] ?? NaN)).join(' ')}" euler="${body.turn.join(' ')}">${inertial(body)}</body>`,
  );
  return `<mujoco>
    <compiler angle="radian" eulerseq="zyx" balanceinertia="false"/>
    <worldbody>
      <body pos="${first.place.join(' ')}"><freejoint/>${inertial(first)}${children.join('')}</body>
    </worldbody>
  </mujoco>`;
}

const numbers = z.custom<Float64Array>((value) => value instanceof Float64Array);

/** Starts the engine; the function it gives says what the engine makes of bodies. The first must not be turned. */
export async function physicsEngine(): Promise<(bodies: readonly EngineBody[]) => Compound> {
  const engine = await loadMujoco();
  const files = z.object({ FS: z.object({ writeFile: z.function({ input: [z.string(), z.string()] }) }) });
  const { FS } = files.parse(engine);
  return (bodies) => {
    FS.writeFile('/compound.xml', model(bodies));
    const compiled = engine.MjModel.loadFromXML('/compound.xml');
    const state = new engine.MjData(compiled);
    engine.mj_forward(compiled, state);
    const [mass, crb, com] = [compiled.body_subtreemass, state.crb, state.subtree_com].map((list) =>
      numbers.parse(list),
    );
    // Ten numbers and three for each body; the world is body 0, the compound body 1.
    const at = (list: Float64Array | undefined, index: number): number => list?.[index] ?? NaN;
    const compound: Compound = {
      mass: at(mass, 1),
      cg: [at(com, 3), at(com, 4), at(com, 5)],
      tensor: {
        xx: at(crb, 10),
        yy: at(crb, 11),
        zz: at(crb, 12),
        xy: at(crb, 13),
        xz: at(crb, 14),
        yz: at(crb, 15),
      },
    };
    state.delete();
    compiled.delete();
    return compound;
  };
}
