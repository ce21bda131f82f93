import { SeverityWord } from '@/components/ui/severity';
import { type Severity } from '@/lib/findings/finding';

export interface AnsweredFinding {
  readonly severity: Severity;
  readonly message: string;
  /** Where it was seen, where that is known. */
  readonly where: string | null;
  readonly answer: string | null;
}

/** What the checks saw, each warning with what the submitter answered; notes after them. */
export function AnsweredFindings({ findings }: { readonly findings: readonly AnsweredFinding[] }) {
  if (findings.length === 0) return <p className="text-ink-2">The checks saw nothing.</p>;
  const rank: Record<Severity, number> = { blocker: 0, warning: 1, note: 2 };
  const sorted = [...findings].sort((a, b) => rank[a.severity] - rank[b.severity]);
  return (
    <ul className="grid border-t border-rule">
      {sorted.map((finding, index) => (
        <li key={index} className="keep-together grid gap-1 border-b border-rule py-2">
          <p className="flex flex-wrap items-baseline gap-x-3">
            <SeverityWord severity={finding.severity} />
            {finding.where === null ? null : <span className="text-ink-2">{finding.where}</span>}
          </p>
          <p className="measure wrap-anywhere">{finding.message}</p>
          {finding.answer === null ? null : (
            <p className="measure border-l-2 border-ink-2 pl-3 wrap-anywhere">
              <span className="text-ink-2">Answer: </span>
              {finding.answer}
            </p>
          )}
        </li>
      ))}
    </ul>
  );
}
