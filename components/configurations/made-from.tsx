import { OneButtonForm } from '@/components/forms/one-button-form';
import { Day } from '@/components/ui/day';
import { TextLink } from '@/components/ui/text-link';
import { type FormAction } from '@/lib/form-state';

/** A list or the rotating parts, on one of their revisions. */
export interface Pin {
  /** Code of the list; null for the rotating parts. */
  readonly list: string | null;
  readonly title: string;
  readonly href: string;
  readonly revision: number;
  readonly newest: number;
  readonly facts: string;
  readonly made: Date;
  readonly marking: string | null;
  /** What is said where it is stated in another frame issue than the configuration's; null where it is not. */
  readonly converted: string | null;
}

interface MadeFromProps {
  readonly pins: readonly Pin[];
  /** Null for those who may only look. */
  readonly take: { readonly action: FormAction; readonly fields: Readonly<Record<string, string>> } | null;
}

/** What a configuration is made from, each on its revision; a newer one is offered, never taken silently. */
export function MadeFrom({ pins, take }: MadeFromProps) {
  return (
    <ul className="grid border-t border-rule">
      {pins.map((pin) => (
        <li key={pin.list ?? ''} className="grid gap-0.5 border-b border-rule py-2">
          <div className="flex flex-wrap items-baseline justify-between gap-x-4">
            <TextLink href={pin.href}>{pin.title}</TextLink>
            <span>
              revision <span className="num font-semibold">{pin.revision}</span>
            </span>
          </div>
          <div className="flex flex-wrap items-baseline justify-between gap-x-4 text-note text-ink-2">
            <span>
              {pin.facts}, <Day at={pin.made} />
              {pin.marking === null ? null : `, marked ${pin.marking}`}
            </span>
            {pin.revision === pin.newest ? <span>newest</span> : null}
          </div>
          {pin.converted === null ? null : <p className="text-note">{pin.converted}</p>}
          {pin.revision === pin.newest ? null : (
            <div className="flex flex-wrap items-baseline justify-between gap-x-4">
              <span className="text-caution">Revision {pin.newest} is the newest</span>
              {take ? (
                <OneButtonForm
                  action={take.action}
                  fields={{ ...take.fields, list: pin.list ?? '', revision: String(pin.newest) }}
                  words={`Take revision ${pin.newest}`}
                  pendingWords="Taking it"
                />
              ) : null}
            </div>
          )}
        </li>
      ))}
    </ul>
  );
}
