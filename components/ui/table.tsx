import { type ComponentProps, type ReactNode } from 'react';
import { classes } from '@/components/ui/classes';

interface TableProps {
  /** Says what the table holds; read out, and shown above it unless `captionHidden`. */
  readonly caption: string;
  readonly captionHidden?: boolean;
  readonly children: ReactNode;
  /** Scrolls inside this many pixels' height with its head kept. */
  readonly tall?: boolean;
}

/** A short table that is all there. For thousands of rows use DataTable. First column stays in sight when it scrolls sideways. */
export function Table({ caption, captionHidden = false, children, tall = false }: TableProps) {
  return (
    <div
      role="region"
      aria-label={caption}
      tabIndex={0}
      className={classes('print-whole relative overflow-x-auto', tall && 'max-h-[70vh] overflow-y-auto')}
    >
      <table className="ruled w-full border-separate border-spacing-0">
        <caption className={captionHidden ? 'sr-only' : 'pb-2 text-left text-note text-ink-2'}>
          {captionHidden ? (
            caption
          ) : (
            <span className="sticky left-0 block w-fit max-w-[calc(100vw-32px)]">{caption}</span>
          )}
        </caption>
        {children}
      </table>
    </div>
  );
}

type Side = 'left' | 'right';

/** A column head. `unit` stands beside the title, once for the column. */
export function ColumnHead({
  children,
  unit,
  side = 'left',
}: {
  readonly children: ReactNode;
  readonly unit?: string;
  readonly side?: Side;
}) {
  return (
    <th scope="col" className={side === 'right' ? 'text-right' : 'text-left'}>
      {children}
      {unit ? <span className="ml-1 font-normal text-ink-2">{unit}</span> : null}
    </th>
  );
}

/** The first cell of a row: its name. */
export function RowHead({ children }: { readonly children: ReactNode }) {
  return (
    <th scope="row" className="min-w-24 text-left font-normal">
      {children}
    </th>
  );
}

type CellProps = ComponentProps<'td'> & { readonly side?: Side };

export function Cell({ side = 'left', className, ...rest }: CellProps) {
  return <td {...rest} className={classes(side === 'right' && 'text-right', className)} />;
}
