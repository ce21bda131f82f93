import { CopyButton } from '@/components/ui/copy-button';
import { Day } from '@/components/ui/day';
import { DefinitionList } from '@/components/ui/definition-list';
import { type HandoffDocument } from '@/lib/baselines/handoff-document';

interface HandOffFactsProps {
  readonly build: string;
  readonly document: Pick<
    HandoffDocument,
    'approved' | 'supersedes' | 'marking' | 'conditions' | 'operatingPoints'
  >;
  readonly digest: string;
  readonly supersededBy: number | null;
}

/** What identifies a baseline to whoever holds a copy of it. */
export function HandOffFacts({ build, document, digest, supersededBy }: HandOffFactsProps) {
  const { approved, supersedes, marking, conditions, operatingPoints } = document;
  const codes = (all: readonly { readonly code: string }[]) =>
    all.length === 0 ? 'none' : <code>{all.map(({ code }) => code).join(', ')}</code>;
  return (
    <DefinitionList
      items={[
        { term: 'Build', value: build },
        {
          term: 'Signed',
          value: (
            <>
              <Day at={new Date(approved.at)} time /> {approved.by}
            </>
          ),
        },
        { term: 'Supersedes', value: supersedes === null ? 'none' : `baseline ${supersedes}` },
        ...(supersededBy === null ? [] : [{ term: 'Superseded by', value: `baseline ${supersededBy}` }]),
        { term: 'Marking', value: marking ?? 'none' },
        { term: 'Conditions', value: codes(conditions) },
        { term: 'Operating points', value: codes(operatingPoints) },
        {
          term: 'Digest',
          value: (
            <span className="grid">
              <code className="wrap-anywhere">{digest}</code>
              <CopyButton words="Copy digest" text={digest} />
            </span>
          ),
        },
      ]}
    />
  );
}
