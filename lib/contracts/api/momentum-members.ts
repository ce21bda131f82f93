import { z } from 'zod';

const h = (axis: string) => z.number().describe(`Body ${axis}; unit of angular momentum`);
const components = { hx: h('x, forward'), hy: h('y, right'), hz: h('z, down') };

export const momentumMembers = {
  angularMomentum: z
    .object(components)
    .describe(
      'h of all rotating parts relative to the airframe, body axes, right-hand rule; the tensor counts them as if locked',
    ),
  gyroMatrix: z
    .array(z.array(z.number()).length(3))
    .length(3)
    .describe('G with G w = h × w: [[0, -hz, hy], [hz, 0, -hx], [-hy, hx, 0]]; unit of angular momentum'),
  sigma: z
    .object({ hx: z.number(), hy: z.number(), hz: z.number() })
    .optional()
    .describe('One standard deviation of the angular momentum; absent where nothing states any'),
  rotors: z.array(
    z.object({
      rotor: z.string(),
      rpm: z.number().describe('Of the rotor about its own axis: shaft speed times gear ratio'),
      ...components,
    }),
  ),
};
