import { AIRFRAME, onSheet, path, type Point } from '@/components/settings/axes-sketch';
import { type BodyVec } from '@/lib/frames/tags';
import { addVec, dotVec, normVec, scaleVec, subVec, type Vec3 } from '@/lib/numerics/vec3';

/** Sheet units: half the shaft, the circle of the turn. */
const [SHAFT, TURN] = [46, 20];
const STEPS = 40;

/** From body axes (z down) to the sheet. */
const at = ([x, y, z]: Vec3): Point => onSheet(x, y, 0 - z);

const cross = (a: Vec3, b: Vec3): Vec3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

/** Two unit arrows across e, so that the second is a quarter of a right-handed turn about e from the first. */
function acrossOf(e: Vec3): readonly [Vec3, Vec3] {
  const aside: Vec3 = Math.abs(e[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0];
  const rough = subVec(aside, scaleVec(dotVec(aside, e), e));
  const u = scaleVec(1 / normVec(rough), rough);
  return [u, cross(e, u)];
}

/** The shaft and the turn of a positive speed on an airframe; not drawn at the rotor's place. `label` says it in words. */
export function SpinSketch({ spin, label }: { readonly spin: BodyVec; readonly label: string }) {
  const [u, v] = acrossOf(spin);
  const middle: Vec3 = [20, 0, 0];
  const ahead = (share: number): Vec3 => addVec(middle, scaleVec(share * SHAFT, spin));
  const turn = Array.from({ length: STEPS + 1 }, (_, step) => {
    const angle = (step / STEPS) * 1.75 * Math.PI;
    return at(
      addVec(ahead(0.35), addVec(scaleVec(TURN * Math.cos(angle), u), scaleVec(TURN * Math.sin(angle), v))),
    );
  });
  const before = turn.at(-3) ?? [0, 0];
  const last = turn.at(-1) ?? [0, 0];
  return (
    <figure className="grid content-start gap-1">
      <svg
        viewBox="-4 34 248 144"
        role="img"
        aria-label={label}
        className="block w-full max-w-72 overflow-visible"
      >
        {AIRFRAME.map((line) => (
          <path key={line} d={line} className="fill-none stroke-ink-2" strokeLinejoin="round" />
        ))}
        <path d={path(at(ahead(-1)), at(ahead(1)))} className="fill-none stroke-spin" strokeWidth="2" />
        <Head from={at(ahead(0.8))} to={at(ahead(1.12))} />
        <path d={path(...turn)} className="fill-none stroke-ink" strokeWidth="1.5" />
        <Head from={before} to={last} turn />
      </svg>
      <figcaption className="text-note text-ink-2">
        The spin arrow and the turn of a positive speed, seen from above, ahead and to the left; not at its
        place.
      </figcaption>
    </figure>
  );
}

/** An arrowhead that ends at `to`; none where the arrow points at the eye. */
function Head({
  from,
  to,
  turn = false,
}: {
  readonly from: Point;
  readonly to: Point;
  readonly turn?: boolean;
}) {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const length = Math.hypot(dx, dy);
  if (length < 1e-6) return null;
  const [ux, uy] = [dx / length, dy / length];
  const [back, side] = turn ? [6, 3] : [11, 4];
  const [x, y] = [to[0] - back * ux, to[1] - back * uy];
  return (
    <path
      d={`M${to[0]} ${to[1]}L${x - side * uy} ${y + side * ux}L${x + side * uy} ${y - side * ux}Z`}
      className={turn ? 'fill-ink' : 'fill-spin'}
    />
  );
}
