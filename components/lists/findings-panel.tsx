import { counted } from '@/components/lists/list-words';
import { Quoted } from '@/components/lists/quoted';
import { SeverityWord } from '@/components/ui/severity';
import { TextLink } from '@/components/ui/text-link';
import { type Finding } from '@/lib/findings/finding';
import { ruleOf } from '@/lib/findings/rules';

interface FindingsPanelProps {
  readonly findings: readonly Finding[];
  /** The address that shows only the rows of a finding. */
  readonly hrefOf: (rule: string) => string;
}

/** What the checks saw in a list, blockers first, each with the way to its rows, and why it matters folded beneath. */
export function FindingsPanel({ findings, hrefOf }: FindingsPanelProps) {
  if (findings.length === 0) return <p className="text-ink-2">The checks saw nothing to tell of.</p>;
  return (
    <ul className="grid border-t border-rule">
      {findings.map((finding) => (
        <li
          key={finding.rule}
          className="keep-together grid gap-x-4 gap-y-1 border-b border-rule py-2 sm:grid-cols-[88px_1fr]"
        >
          <SeverityWord severity={finding.severity} />
          <div className="measure grid min-w-0 gap-1 wrap-anywhere">
            <p>
              <Quoted text={finding.message} />
            </p>
            {finding.rows.length > 0 ? (
              <p>
                <TextLink href={hrefOf(finding.rule)}>
                  {finding.count > finding.rows.length
                    ? `Show the first ${finding.rows.length} of ${counted(finding.count, 'row')}`
                    : `Show ${counted(finding.count, 'row')}`}
                </TextLink>
              </p>
            ) : null}
            <Why rule={finding.rule} />
          </div>
        </li>
      ))}
    </ul>
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
