import { findingKey } from '@/lib/baselines/finding-key';
import { CAUTION } from '@/lib/baselines/caution';
import { conventionsOf, rollUpMembers } from '@/lib/contracts/condition-members';
import { type PlacedFinding } from '@/lib/findings/finding';
import { limitMembers } from '@/lib/baselines/limit-members';
import { type IssueChange, changedPlace } from '@/lib/frames/issue-change';
import { type ConfigurationResult, type PointResult, standingsOf } from '@/lib/loading/configuration';
import { type MassUncertainty } from '@/lib/mass/uncertainty/uncertainty-of';
import { type Vec3 } from '@/lib/numerics/vec3';
import { degreesAsTyped, rpmAsTyped } from '@/lib/units/convert';

export interface Stamp {
  /** ISO 8601, UTC. */
  readonly at: string;
  readonly by: string;
}

export interface HandoffInput {
  readonly program: string;
  readonly baseline: number;
  readonly build: string;
  readonly title: string;
  readonly supersedes: number | null;
  readonly marking: string | null;
  readonly submitted: Stamp;
  readonly approved: Stamp;
  readonly frameIssue: string;
  readonly referencePoints: readonly { readonly code: string; readonly place: Vec3 }[];
  readonly result: ConfigurationResult;
  readonly findings: readonly PlacedFinding[];
  readonly answers: Readonly<Record<string, string>>;
  readonly sources: readonly {
    readonly list: string;
    readonly revision: number;
    readonly contentSha256: string;
    readonly fileSha256: string | null;
    readonly rows: number;
    /** From the issue that the revision is stated in, where that is another one than the document's. */
    readonly converted: { readonly frameIssue: string; readonly change: IssueChange } | null;
  }[];
}

/**
 * The hand-off document of contract section 3 without `digest` and `state`: the digest is taken over just this, and the state
 * follows from later events. SI; CG in airframe axes, inertia about the CG in body axes with products as positive integrals.
 */
export function handoffDocument(input: HandoffInput) {
  const { result } = input;
  const { geometry } = result;
  return {
    format: 1 as const,
    program: input.program,
    baseline: input.baseline,
    build: input.build,
    title: input.title,
    supersedes: input.supersedes,
    marking: input.marking,
    caution: CAUTION,
    submitted: input.submitted,
    approved: input.approved,
    conventions: {
      ...conventionsOf(geometry, 'si', degreesAsTyped(geometry.incidence)),
      frameIssue: input.frameIssue,
    },
    referencePoints: input.referencePoints.map(({ code, place: [x, y, z] }) => ({
      code,
      airframe: { x, y, z },
    })),
    conditions: result.conditions.map(({ code, title, rollUp, uncertainty }) => ({
      code,
      title,
      ...rollUpMembers(rollUp, 'si'),
      ...sigmaMember(uncertainty.basic),
    })),
    ...limitsMember(result),
    operatingPoints: result.operatingPoints.map((point) => ({
      ...pointMember(point),
      ...sigmaOfPoint(point),
    })),
    findings: input.findings.map((finding) => {
      const answer = input.answers[findingKey(finding)];
      return {
        rule: finding.rule,
        severity: finding.severity,
        message: finding.message,
        ...(answer === undefined ? {} : { answer }),
      };
    }),
    sources: input.sources.map(({ list, revision, contentSha256, fileSha256, rows, converted }) => ({
      list,
      revision,
      sha256: contentSha256,
      ...(fileSha256 === null ? {} : { fileSha256 }),
      rows,
      ...convertedMember(converted),
    })),
  };
}

/** Absent where nothing was converted, and in documents of before anything could be. */
function convertedMember(converted: HandoffInput['sources'][number]['converted']) {
  if (converted === null) return {};
  const [x, y, z] = changedPlace(converted.change, [0, 0, 0]);
  return {
    converted: {
      frameIssue: converted.frameIssue,
      datum: { airframe: { x, y, z } },
      matrix: converted.change.matrix.map((row) => [...row]),
    },
  };
}

/** Documents of before limits were kept with a baseline have none. */
export type HandoffDocument = ReturnType<typeof handoffDocument>;

/** Absent where no limit was in force. */
function limitsMember(result: ConfigurationResult): { limits?: ReturnType<typeof limitMembers> } {
  const limits = limitMembers(standingsOf(result));
  return limits.length === 0 ? {} : { limits };
}

/** Angular momentum in body axes, kg.m2/s, by the right-hand rule; rpm of each rotor about its own axis. */
export function pointMember({ code, momentum }: Pick<PointResult, 'code' | 'momentum'>) {
  const [hx, hy, hz] = momentum.total;
  return {
    code,
    angularMomentum: { hx, hy, hz },
    gyroMatrix: momentum.gyroMatrix.map((row) => [...row]),
    rotors: momentum.rotors.map((part) => ({
      rotor: part.rotor,
      rpm: rpmAsTyped(part.speed),
      hx: part.momentum[0],
      hy: part.momentum[1],
      hz: part.momentum[2],
    })),
  };
}

/**
 * One standard deviation of the basic mass, CG (airframe axes) and moments (body axes, products as positive integrals), with the
 * share of the mass, 0 to 1, that states one. Absent where no row states any: zero would read as certain.
 */
function sigmaMember({ mass, massShare, properties }: MassUncertainty) {
  if (properties === null || massShare === null || massShare === 0) return {};
  const { x, y, z } = properties.cg;
  const { ixx, iyy, izz, ixy, ixz, iyz } = properties.inertia;
  return { sigma: { mass, cg: { x, y, z }, inertia: { ixx, iyy, izz, ixy, ixz, iyz }, massShare } };
}

/** One standard deviation of h; absent where no polar inertia and no speed states any. */
export function sigmaOfPoint({ uncertainty, momentum }: Pick<PointResult, 'uncertainty' | 'momentum'>) {
  const [hx, hy, hz] = uncertainty.sigma;
  const stated = momentum.rotors.length > uncertainty.rotorsWithoutSigma.length || hx + hy + hz > 0;
  return stated ? { sigma: { hx, hy, hz } } : {};
}
