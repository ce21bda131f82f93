import { type ReactNode } from 'react';
import { CopyButton } from '@/components/ui/copy-button';
import { Day } from '@/components/ui/day';

interface Signature {
  readonly by: string;
  readonly at: Date;
}

interface TitleBlockProps {
  readonly program: string;
  readonly build: string;
  readonly title: string;
  /** Null before it is signed. */
  readonly number: number | null;
  /** Who made what it holds. */
  readonly preparedBy: readonly string[];
  readonly submitted: Signature;
  /** Null before it is signed. */
  readonly approved: Signature | null;
  readonly supersedes: number | null;
  readonly digest: string | null;
  /** Stands where the signature will stand: the form to sign, or why it cannot be signed. */
  readonly decision?: ReactNode;
}

/** The lower right corner, as on a drawing: who prepared, submitted and approved what, when, under which number and digest. */
export function TitleBlock(props: TitleBlockProps) {
  const { program, build, title, number, preparedBy, submitted, approved, supersedes, digest, decision } =
    props;
  return (
    <section aria-label="Title block" className="keep-together print:ml-auto print:w-3/5">
      <div className="grid grid-cols-2 border-t border-l border-ink bg-sheet">
        <BlockCell label="Program" value={program} />
        <BlockCell label="Build" value={build} />
        <BlockCell label="Title" value={title} wide strong />
        <BlockCell label="Prepared" value={preparedBy.join(', ')} wide />
        <BlockCell label="Submitted" value={<Signed signature={submitted} />} wide={decision !== undefined} />
        {decision === undefined ? (
          <BlockCell
            label="Approved"
            value={
              approved === null ? (
                <span className="text-ink-2">not signed</span>
              ) : (
                <Signed signature={approved} />
              )
            }
          />
        ) : (
          <BlockCell label="Approved" value={decision} wide />
        )}
        <BlockCell
          label="Baseline"
          value={
            number === null ? (
              <span className="text-ink-2">no number yet</span>
            ) : (
              <BlockNumber number={number} />
            )
          }
        />
        <BlockCell
          label="Supersedes"
          value={
            supersedes === null ? (
              <span className="text-ink-2">none</span>
            ) : (
              <BlockNumber number={supersedes} />
            )
          }
        />
        {digest === null ? null : (
          <BlockCell
            label="Digest"
            wide
            value={
              <span className="grid">
                <span className="font-mono text-note wrap-anywhere">{digest}</span>
                <CopyButton words="Copy digest" text={digest} />
              </span>
            }
          />
        )}
      </div>
    </section>
  );
}

function BlockCell({
  label,
  value,
  wide = false,
  strong = false,
}: {
  readonly label: string;
  readonly value: ReactNode;
  readonly wide?: boolean;
  readonly strong?: boolean;
}) {
  return (
    <div className={`min-w-0 border-r border-b border-ink px-3 py-1.5 ${wide ? 'col-span-2' : ''}`}>
      <p className="text-note text-ink-2">{label}</p>
      <div className={`wrap-anywhere ${strong ? 'text-lead font-semibold' : ''}`}>{value}</div>
    </div>
  );
}

function Signed({ signature: { by, at } }: { readonly signature: Signature }) {
  return (
    <>
      {by}
      <br />
      <Day at={at} time />
    </>
  );
}

function BlockNumber({ number }: { readonly number: number }) {
  return <span className="num text-section">{number}</span>;
}
