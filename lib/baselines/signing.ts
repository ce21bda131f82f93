import { type MemberRole } from '@/lib/permissions';
import { type SubmissionState } from './states';

interface SigningCase {
  readonly userId: string;
  readonly role: MemberRole | null;
  readonly state: SubmissionState;
  readonly submittedBy: string;
  readonly revisions: readonly {
    readonly list_code: string;
    readonly number: number;
    readonly created_by: string;
  }[];
  readonly rotors: { readonly number: number; readonly created_by: string } | null;
}

/**
 * Why someone may not sign a submission, a sentence each; none when they may. The database refuses on the same grounds, whatever
 * is said here.
 */
export function signingObstacles({
  userId,
  role,
  state,
  submittedBy,
  revisions,
  rotors,
}: SigningCase): string[] {
  if (state !== 'submitted') return ['It is decided already.'];
  if (role !== 'chief') return ['Only a chief engineer of the program signs or returns a submission.'];
  const own = revisions.filter((revision) => revision.created_by === userId);
  return [
    ...(submittedBy === userId ? ['You submitted it, and nobody signs what they submitted.'] : []),
    ...own.map(
      ({ list_code: list, number }) =>
        `You made revision ${number} of list ${list}, which it holds. Nobody signs a revision they made.`,
    ),
    ...(rotors?.created_by === userId
      ? [
          `You made revision ${rotors.number} of the rotating parts, which it holds. Nobody signs a revision they made.`,
        ]
      : []),
  ];
}
