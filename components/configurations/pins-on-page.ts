import { type Pin } from '@/components/configurations/made-from';

interface PinnedList {
  readonly list_code: string;
  readonly list_title: string;
  readonly number: number;
  readonly newest: number;
  readonly rows: number;
  readonly marking: string | null;
  readonly created_at: Date;
  readonly frame_issue_id: string;
}

interface RotorRevisionLine {
  readonly frame_issue_id: string | null;
  readonly number: number;
  readonly rotors: readonly unknown[];
  readonly points: readonly unknown[];
  readonly created_at: Date;
}

/** The pins of a configuration as its page shows them, the rotating parts last. */
export function pinsOnPage(
  program: string,
  lists: readonly PinnedList[],
  configuration: { readonly rotor_revision_number: number | null; readonly frame_issue_id: string },
  rotorRevisions: readonly RotorRevisionLine[],
  issues: readonly { readonly id: string; readonly number: number }[],
): Pin[] {
  const numberOf = (id: string) => issues.find((issue) => issue.id === id)?.number ?? '';
  const converted = (statedIn: string | null): string | null =>
    statedIn === null || statedIn === configuration.frame_issue_id
      ? null
      : `Stated in frame issue ${numberOf(statedIn)}, converted to ${numberOf(configuration.frame_issue_id)}`;
  const home = `/programs/${program}`;
  const pins: Pin[] = lists.map((pin) => ({
    list: pin.list_code,
    title: pin.list_title,
    href: `${home}/lists/${pin.list_code}?revision=${pin.number}`,
    revision: pin.number,
    newest: pin.newest,
    facts: `${pin.rows} rows`,
    made: pin.created_at,
    marking: pin.marking,
    converted: converted(pin.frame_issue_id),
  }));
  const rotors = rotorRevisions.find(({ number }) => number === configuration.rotor_revision_number);
  if (rotors === undefined) return pins;
  return [
    ...pins,
    {
      list: null,
      title: 'Rotating parts',
      href: `${home}/rotating-parts?revision=${rotors.number}`,
      revision: rotors.number,
      newest: rotorRevisions[0]?.number ?? rotors.number,
      facts: `${rotors.rotors.length} rotors, ${rotors.points.length} operating points`,
      made: rotors.created_at,
      marking: null,
      converted: converted(rotors.frame_issue_id),
    },
  ];
}
