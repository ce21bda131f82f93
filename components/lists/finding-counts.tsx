import { SeverityMark, SEVERITY_TEXT, SEVERITY_WORDS } from '@/components/ui/severity';
import { type Finding, type Severity } from '@/lib/findings/finding';

const SEVERITIES: readonly Severity[] = ['blocker', 'warning', 'note'];

/** How many findings of each severity, in a line. */
export function FindingCounts({ findings }: { readonly findings: readonly Pick<Finding, 'severity'>[] }) {
  const counts = SEVERITIES.map((severity) => ({
    severity,
    count: findings.filter((finding) => finding.severity === severity).length,
  })).filter(({ count }) => count > 0);
  if (counts.length === 0) return <span className="text-ink-2">None</span>;
  return (
    <span className="flex flex-wrap gap-x-3">
      {counts.map(({ severity, count }) => (
        <span
          key={severity}
          className={`inline-flex items-center gap-1 whitespace-nowrap ${SEVERITY_TEXT[severity]}`}
        >
          <SeverityMark severity={severity} />
          <span className="num">{count}</span> {SEVERITY_WORDS[severity].toLowerCase()}
          {count === 1 ? '' : 's'}
        </span>
      ))}
    </span>
  );
}
