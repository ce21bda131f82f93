import { counted } from '@/components/lists/list-words';
import { Quoted } from '@/components/lists/quoted';
import { SeverityWord } from '@/components/ui/severity';
import { TextLink } from '@/components/ui/text-link';
import { type Finding } from '@/lib/findings/finding';
import { bySeverity } from '@/lib/findings/look';
import { ruleOf } from '@/lib/findings/rules';

export interface FindingLine extends Finding {
  /** Where it was seen, e.g. "List wing, revision 3"; null where the page says it. */
  readonly seen: string | null;
  /** The page that shows the rows concerned. */
  readonly href: string | null;
  /** Where the finding names groups: the rows of each. */
  readonly groups?: readonly { readonly words: string; readonly href: string }[] | null;
  /** What the submitter wrote to it. */
  readonly answer?: string | null;
}

/** Findings, blockers first, each with its rows one click away, its answer where it has one, and its reason folded beneath. */
export function FindingLines({ findings }: { readonly findings: readonly FindingLine[] }) {
  if (findings.length === 0) return <p className="text-ink-2">The checks saw nothing to tell of.</p>;
  return (
    <ul className="grid border-t border-rule">
      {[...findings].sort(bySeverity).map((finding, index) => (
        <li
          key={index}
          className="keep-together grid gap-x-4 gap-y-1 border-b border-rule py-2 sm:grid-cols-[88px_1fr]"
        >
          <SeverityWord severity={finding.severity} />
          <div className="measure grid min-w-0 gap-1 wrap-anywhere">
            {finding.seen === null ? null : <p className="text-note text-ink-2">{finding.seen}</p>}
            <p>
              <Quoted text={finding.message} />
            </p>
            <Rows finding={finding} />
            {finding.answer ? (
              <p className="border-l-2 border-ink-2 pl-3">
                <span className="text-ink-2">Answer: </span>
                {finding.answer}
              </p>
            ) : null}
            <Why rule={finding.rule} />
          </div>
        </li>
      ))}
    </ul>
  );
}

const NAMED_AT_ONCE = 6;

function Rows({ finding: { rows, count, href, groups } }: { readonly finding: FindingLine }) {
  if (groups)
    return (
      <p className="flex flex-wrap gap-x-4">
        {groups.map((group) => (
          <TextLink key={group.href} href={group.href}>
            {group.words}
          </TextLink>
        ))}
      </p>
    );
  if (rows.length === 0) return null;
  if (href !== null)
    return (
      <p>
        <TextLink href={href}>
          {count > rows.length
            ? `Show the first ${rows.length} of ${counted(count, 'row')}`
            : `Show ${counted(count, 'row')}`}
        </TextLink>
      </p>
    );
  const more = count - Math.min(NAMED_AT_ONCE, rows.length);
  return (
    <p className="text-ink-2">
      {rows.slice(0, NAMED_AT_ONCE).join(', ')}
      {more > 0 ? ` and ${more} more` : ''}
    </p>
  );
}

function Why({ rule }: { readonly rule: string }) {
  const about = ruleOf(rule);
  if (about === null) return null;
  return (
    <details className="text-note text-ink-2">
      <summary className="cursor-pointer underline decoration-1 underline-offset-4">
        Why, and what to do
      </summary>
      <div className="grid gap-1 pt-1">
        <p>{about.why}</p>
        <p>{about.remedy}</p>
        <p>Source: {about.source}</p>
      </div>
    </details>
  );
}
