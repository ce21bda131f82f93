interface ProgressBarProps {
  /** What is being done, e.g. "Checking rows". */
  readonly label: string;
  readonly done: number;
  /** Null while it isn't known how many there are. */
  readonly total: number | null;
  /** What is counted, e.g. "rows". */
  readonly of: string;
}

/** Real progress on a ruled bar: how many done, of how many. */
export function ProgressBar({ label, done, total, of }: ProgressBarProps) {
  const share = total === null || total === 0 ? 0 : Math.min(1, done / total);
  const count = total === null ? `${grouped(done)} ${of}` : `${grouped(done)} of ${grouped(total)} ${of}`;
  return (
    <div className="grid gap-1">
      <div className="flex flex-wrap justify-between gap-x-4">
        <span className="font-semibold">{label}</span>
        <span className="num">{count}</span>
      </div>
      <div
        role="progressbar"
        aria-label={label}
        aria-valuetext={count}
        {...(total === null
          ? {}
          : { 'aria-valuemin': 0, 'aria-valuemax': total, 'aria-valuenow': Math.min(done, total) })}
      >
        <svg width="100%" height="14" aria-hidden="true" className="block">
          <rect width="100%" height="6" className="fill-rule" />
          <rect width={`${share * 100}%`} height="6" className="fill-spin" />
          {Array.from({ length: 11 }, (_, tick) => (
            <line
              key={tick}
              x1={tick === 10 ? '100%' : `${tick * 10}%`}
              x2={tick === 10 ? '100%' : `${tick * 10}%`}
              y1="6"
              y2={tick % 5 === 0 ? 14 : 10}
              className="tick"
            />
          ))}
        </svg>
      </div>
    </div>
  );
}

function grouped(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+$)/g, ' ');
}
