import { type Db } from '@/db/client';
import { pointMember, sigmaOfPoint } from '@/lib/baselines/handoff-document';
import { readStoredDocument } from '@/lib/baselines/stored-document';
import { rpmSchema, shaftOf } from '@/lib/contracts/api/angular-momentum';
import { inputWords } from '@/lib/contracts/input-words';
import { type InputError } from '@/lib/errors';
import { angularMomentum, shaftsWithoutSpeed } from '@/lib/rotors/momentum';
import { type ShaftSpeed } from '@/lib/rotors/rotor';
import { momentumUncertainty } from '@/lib/rotors/uncertainty';
import { parametersWrong } from '@/lib/server/api/read-query';
import { radiansPerSecond } from '@/lib/units/convert';
import { type SignedBaseline } from './reach-baseline';

/**
 * h and G of a baseline's rotating parts: at one of its operating points as it was signed, or at the speeds of `shaft.NAME=rpm`
 * parameters, computed from the frozen rotors; such a speed counts as certain.
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
  const { operatingPoints } = readStoredDocument(baseline.document);
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
  asked: readonly { readonly name: string; readonly shaft: string; readonly value: string }[],
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
  const speeds: ShaftSpeed[] = asked.flatMap(({ name, shaft, value }) => {
    const rpm = rpmSchema.safeParse(value, { error: inputWords });
    if (!shafts.has(shaft))
      errors.push({ parameter: name, message: `Shafts: ${[...shafts].join(', ') || 'none'}.` });
    else if (!rpm.success)
      errors.push({ parameter: name, message: rpm.error.issues[0]?.message ?? 'Not a speed.' });
    else return [{ shaft, speed: radiansPerSecond(rpm.data), sigma: null }];
    return [];
  });
  const named = asked.map(({ shaft }) => ({ shaft, speed: 0, sigma: null }));
  for (const shaft of shaftsWithoutSpeed(parts, { speeds: named }))
    errors.push({
      parameter: `shaft.${shaft}`,
      message: 'Give the speed of this shaft in rpm, or name a point instead.',
    });
  if (parts.length === 0)
    errors.push({ parameter: 'point', message: 'This baseline has no rotating parts.' });
  if (errors.length > 0) throw parametersWrong(errors);
  const given = { code: 'given', speeds };
  const momentum = angularMomentum(parts, given, result.geometry);
  const uncertainty = momentumUncertainty(parts, given, result.geometry);
  const { angularMomentum: h, gyroMatrix, rotors: each } = pointMember({ code: given.code, momentum });
  return {
    operatingPoint: null,
    angularMomentum: h,
    gyroMatrix,
    rotors: each,
    ...sigmaOfPoint({ momentum, uncertainty }),
  };
}
