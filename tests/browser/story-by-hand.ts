import { FRAME } from './story-inputs';

/*
 * The story's list added up in plain arithmetic, to share nothing with the engine but the file. Factors: NIST SP 811, Appendix B.8
 * (1 lb = 0.45359237 kg, 1 in = 0.0254 m, exactly). Steiner: J = Σ [J_own + m (|d|² 1 - d dᵀ)].
 */
const LB = 0.45359237;
const INCH = 0.0254;

interface Body {
  readonly mass: number;
  /** Forward, right, down in body axes from the datum, m. */
  readonly place: readonly [number, number, number];
  readonly own: { readonly xx: number; readonly yy: number; readonly zz: number; readonly xz: number };
}

/** Mass, CG (airframe axes) and the moments and Ixz (positive integral, body axes) of the empty aircraft in SI. */
export function byHand(list: string) {
  const bodies = list.trim().split('\n').slice(1).flatMap(bodiesOf);
  const mass = sum(bodies, (body) => body.mass);
  const mean = (k: 0 | 1 | 2) => sum(bodies, (body) => body.mass * body.place[k]) / mass;
  const cg = [mean(0), mean(1), mean(2)] as const;
  const about = (of: (d: readonly [number, number, number], body: Body) => number) =>
    sum(bodies, (body) => {
      const [x, y, z] = body.place;
      return of([x - cg[0], y - cg[1], z - cg[2]], body);
    });
  const [sin, cos] = [Math.sin(TILT), Math.cos(TILT)];
  return {
    mass,
    // Back from body to airframe axes: aft is minus forward, up minus down.
    cg: { x: -(cos * cg[0] + sin * cg[2]), y: cg[1], z: sin * cg[0] - cos * cg[2] },
    ixx: about(([, y, z], { mass: m, own }) => own.xx + m * (y * y + z * z)),
    iyy: about(([x, , z], { mass: m, own }) => own.yy + m * (x * x + z * z)),
    izz: about(([x, y], { mass: m, own }) => own.zz + m * (x * x + y * y)),
    ixz: about(([x, , z], { mass: m, own }) => own.xz + m * x * z),
  };
}

const TILT = (FRAME.incidence * Math.PI) / 180;

/** A row, and its mirror image where it stands for a pair. */
function bodiesOf(line: string): Body[] {
  const [, , mass, x, y, z, ixx, iyy, izz, , ixz, , symmetry] = line.split(',');
  const [aft, right, up] = [x, y, z].map((text) => INCH * Number(text)) as [number, number, number];
  const unit = LB * INCH ** 2;
  // Reference line: forward and down, then tilted nose-up by the incidence, the same for places and for the tensor.
  const [sin, cos] = [Math.sin(TILT), Math.cos(TILT)];
  const place = (side: number) => [-cos * aft + sin * up, side * right, -sin * aft - cos * up] as const;
  // The file's sign is the tensor's, and aft-up to forward-down turns both axes: the integral is minus the file's figure.
  const line0 = { xx: unit * Number(ixx), zz: unit * Number(izz), xz: -unit * Number(ixz) };
  const own = {
    xx: cos ** 2 * line0.xx + sin ** 2 * line0.zz + 2 * sin * cos * line0.xz,
    yy: unit * Number(iyy),
    zz: sin ** 2 * line0.xx + cos ** 2 * line0.zz - 2 * sin * cos * line0.xz,
    xz: (cos ** 2 - sin ** 2) * line0.xz + sin * cos * (line0.zz - line0.xx),
  };
  const body = (side: number): Body => ({ mass: LB * Number(mass), place: place(side), own });
  return symmetry === 'pair' ? [body(1), body(-1)] : [body(1)];
}

function sum(bodies: readonly Body[], term: (body: Body) => number): number {
  return bodies.reduce((total, body) => total + term(body), 0);
}
