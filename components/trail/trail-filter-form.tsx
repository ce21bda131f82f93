import { Button } from '@/components/ui/button';
import { type Option, SelectField } from '@/components/ui/select-field';
import { TextField } from '@/components/ui/text-field';
import { TextLink } from '@/components/ui/text-link';

interface TrailFilterFormProps {
  readonly path: string;
  readonly typed: Readonly<Record<'kind' | 'person' | 'from' | 'until' | 'subject', string>>;
  readonly people: readonly { readonly id: string; readonly name: string }[];
  readonly kinds: readonly Option[];
}

/** What of the trail is shown; the choice is the page's address. */
export function TrailFilterForm({ path, typed, people, kinds }: TrailFilterFormProps) {
  return (
    <form
      action={path}
      className="no-print grid items-end gap-x-4 gap-y-3 sm:grid-cols-2 md:grid-cols-[2fr_2fr_160px_160px_2fr_auto]"
    >
      <SelectField
        name="kind"
        label="What"
        options={kinds}
        placeholder="Everything"
        defaultValue={typed.kind}
      />
      <SelectField
        name="person"
        label="Who"
        options={people.map(({ id, name }) => ({ value: id, label: name }))}
        placeholder="Everybody"
        defaultValue={typed.person}
      />
      <TextField key={`from ${typed.from}`} name="from" type="date" label="From" defaultValue={typed.from} />
      <TextField
        key={`until ${typed.until}`}
        name="until"
        type="date"
        label="Until"
        defaultValue={typed.until}
      />
      <TextField
        key={`subject ${typed.subject}`}
        name="subject"
        type="search"
        label="Subject contains"
        defaultValue={typed.subject}
      />
      <div className="flex items-center gap-4">
        <Button type="submit">Filter events</Button>
        <TextLink href={path}>All</TextLink>
      </div>
    </form>
  );
}
