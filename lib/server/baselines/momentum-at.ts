import { type Db } from '@/db/client';
import { pointMember } from '@/lib/baselines/handoff-document';
import { rpmSchema, shaftOf } from '@/lib/contracts/api/angular-momentum';
import { type InputError } from '@/lib/errors';
import { angularMomentum, shaftsWithoutSpeed } from '@/lib/rotors/momentum';
import { type ShaftSpeed } from '@/lib/rotors/rotor';
import { parametersWrong } from '@/lib/server/api/read-query';
import { radiansPerSecond } from '@/lib/units/convert';
import { documentOf } from './answer';
import { type SignedBaseline } from './reach-baseline';

/**
 * h and G of a baseline's rotating parts: at one of its operating points as it was signed, or at the speeds of `shaft.NAME=rpm`
 * parameters, computed from the frozen rotors.
 * @throws AppError invalid-input for both or neither, for an unknown point or shaft, and for a shaft without a speed.
 */
export async function momentumAt(
  db: Db,
  baseline: SignedBaseline,
  query: Readonly<Record<string, string | undefined>>,
) {
  const { point } = query;
  const given = Object.entries(query).flatMap(([name, value]) => {
    const shaft = shaftOf(name);
    return shaft === null || value === undefined ? [] : [{ name, shaft, value }];
  });
  if (point !== undefined && given.length > 0)
    throw parametersWrong([
      { parameter: 'point', message: 'Give either an operating point or shaft speeds.' },
    ]);
  if (point !== undefined) return atPoint(baseline, point);
  return atSpeeds(db, baseline, given);
}

function atPoint(baseline: SignedBaseline, code: string) {
  const { operatingPoints } = documentOf(baseline);
  const found = operatingPoints.find((one) => one.code === code);
  if (found === undefined) {
    const known = operatingPoints.map((one) => one.code).join(', ') || 'none';
    throw parametersWrong([{ parameter: 'point', message: `Operating points of this baseline: ${known}.` }]);
  }
  const { code: operatingPoint, ...momentum } = found;
  return { operatingPoint, ...momentum };
}

async function atSpeeds(
  db: Db,
  baseline: SignedBaseline,
  given: readonly { readonly name: string; readonly shaft: string; readonly value: string }[],
) {
  const { result, rotors } = await db
    .selectFrom('submissions')
    .leftJoin('rotor_revisions', 'rotor_revisions.id', 'submissions.rotor_revision_id')
    .select(['submissions.result', 'rotor_revisions.rotors'])
    .where('submissions.id', '=', baseline.submission_id)
    .executeTakeFirstOrThrow();
  const parts = rotors ?? [];
  const shafts = new Set(parts.map(({ shaft }) => shaft));
  const errors: InputError[] = [];
  const speeds: ShaftSpeed[] = given.flatMap(({ name, shaft, value }) => {
    const rpm = rpmSchema.safeParse(value);
    if (!shafts.has(shaft))
      errors.push({ parameter: name, message: `Shafts: ${[...shafts].join(', ') || 'none'}.` });
    else if (!rpm.success)
      errors.push({ parameter: name, message: rpm.error.issues[0]?.message ?? 'Not a speed.' });
    else return [{ shaft, speed: radiansPerSecond(rpm.data), sigma: null }];
    return [];
  });
  for (const shaft of shaftsWithoutSpeed(parts, {
    speeds: given.map((one) => ({ ...one, speed: 0, sigma: null })),
  }))
    errors.push({
      parameter: `shaft.${shaft}`,
      message: 'Give the speed of this shaft in rpm, or name a point instead.',
    });
  if (parts.length === 0)
    errors.push({ parameter: 'point', message: 'This baseline has no rotating parts.' });
  if (errors.length > 0) throw parametersWrong(errors);
  const { code: _, ...momentum } = pointMember({
    code: '',
    momentum: angularMomentum(parts, { code: 'given', speeds }, result.geometry),
  });
  return { operatingPoint: null, ...momentum };
}
