import { OneButtonForm } from '@/components/forms/one-button-form';
import { Day } from '@/components/ui/day';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type FormAction } from '@/lib/form-state';

interface PersonLine {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly admin: boolean;
  readonly joined: boolean;
  readonly disabledAt: Date | null;
  readonly programs: number;
  readonly lastSeen: Date | null;
}

interface PeopleTableProps {
  readonly people: readonly PersonLine[];
  /** Who looks: has no button for themselves. */
  readonly ownId: string;
  readonly actions: {
    readonly resend: FormAction;
    readonly disable: FormAction;
    readonly enable: FormAction;
  };
}

export function PeopleTable({ people, ownId, actions }: PeopleTableProps) {
  return (
    <Table caption="People" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Name</ColumnHead>
          <ColumnHead>Mail address</ColumnHead>
          <ColumnHead>Account</ColumnHead>
          <ColumnHead side="right">Programs</ColumnHead>
          <ColumnHead>Last sign-in kept</ColumnHead>
          <ColumnHead>
            <span className="sr-only">Change</span>
          </ColumnHead>
        </tr>
      </thead>
      <tbody>
        {people.map((person) => (
          <tr key={person.id}>
            <RowHead>
              {person.name}
              {person.admin ? <span className="text-ink-2">, administrator</span> : null}
            </RowHead>
            <Cell>{person.email}</Cell>
            <Cell>{accountWords(person)}</Cell>
            <Cell side="right" className="num">
              {person.programs}
            </Cell>
            <Cell>{person.lastSeen === null ? null : <Day at={person.lastSeen} time />}</Cell>
            <Cell>
              <div className="flex gap-x-4 whitespace-nowrap">
                {person.joined || person.disabledAt !== null ? null : (
                  <OneButtonForm
                    inRow
                    action={actions.resend}
                    fields={{ userId: person.id }}
                    words="Send invitation again"
                    pendingWords="Sending"
                  />
                )}
                {person.id === ownId ? null : (
                  <OneButtonForm
                    inRow
                    action={person.disabledAt === null ? actions.disable : actions.enable}
                    fields={{ userId: person.id }}
                    words={person.disabledAt === null ? 'Disable account' : 'Enable account'}
                    pendingWords="Changing"
                  />
                )}
              </div>
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function accountWords(person: PersonLine): string {
  if (person.disabledAt !== null) return 'Disabled';
  return person.joined ? 'Joined' : 'Invited';
}
