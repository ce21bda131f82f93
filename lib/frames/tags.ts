import { type Vec3 } from '@/lib/numerics/vec3';

declare const frame: unique symbol;

/** The frames a quantity can be stated in: a list's own, the airframe's, or body axes. */
export type FrameName = 'list' | 'airframe' | 'body';

/**
 * T with the frame it is stated in. An untagged value may enter any frame (that is how data come in at the edges); a value tagged
 * with one frame is refused where another is asked for.
 */
export type In<F extends FrameName, T> = T & { readonly [frame]?: F };

export type ListVec = In<'list', Vec3>;
export type AirframeVec = In<'airframe', Vec3>;
export type BodyVec = In<'body', Vec3>;
