export interface Source {
  readonly list: string;
  readonly revision: number;
  readonly rows: number;
  /** Of the rows and what the list declares. */
  readonly sha256: string;
  /** Of the file as it came; null where rows were edited. */
  readonly fileSha256: string | null;
  readonly author: string | null;
  readonly marking: string | null;
  /** Number and title of the frame issue that it is stated in, where it was converted from that; null where it was not. */
  readonly convertedFrom: string | null;
}

/** The list revisions that results were made from, with their hashes. */
export function SourceList({ sources }: { readonly sources: readonly Source[] }) {
  return (
    <ul className="grid border-t border-rule">
      {sources.map((source) => (
        <li key={source.list} className="keep-together grid gap-0.5 border-b border-rule py-2">
          <p>
            <span className="font-mono">{source.list}</span>, revision {source.revision}, {source.rows} rows
            {source.author === null ? null : `, by ${source.author}`}
          </p>
          {source.marking === null ? null : <p className="text-note">Marking: {source.marking}</p>}
          {source.convertedFrom === null ? null : (
            <p className="text-note">Stated in frame issue {source.convertedFrom}, and converted</p>
          )}
          <p className="text-note wrap-anywhere text-ink-2">
            Content SHA-256 <span className="font-mono">{source.sha256}</span>
          </p>
          {source.fileSha256 === null ? null : (
            <p className="text-note wrap-anywhere text-ink-2">
              File SHA-256 <span className="font-mono">{source.fileSha256}</span>
            </p>
          )}
        </li>
      ))}
    </ul>
  );
}
