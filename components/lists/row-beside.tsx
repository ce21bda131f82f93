'use client';

import { type WholeOnPage } from '@/components/lists/row-shares';
import { RowInspector } from '@/components/lists/row-inspector';
import { Actions } from '@/components/ui/actions';
import { ButtonLink } from '@/components/ui/button';
import { type ListRow } from '@/lib/contracts/list-rows';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type ListDeclarations } from '@/lib/mass/declarations';

interface RowBesideProps {
  readonly row: ListRow;
  readonly declarations: ListDeclarations;
  readonly geometry: AirframeGeometry;
  readonly wholes: readonly WholeOnPage[];
  readonly file: string | null;
  /** Where the list is edited; null where the reader may not, or it is a former revision. */
  readonly editHref: string | null;
}

/** One row beside the table, and the way to edit it. */
export function RowBeside({ row, editHref, ...shown }: RowBesideProps) {
  const item = String(row.cells.item ?? '');
  return (
    <>
      {editHref === null ? null : (
        <Actions>
          <ButtonLink href={`${editHref}?${new URLSearchParams({ edit: item }).toString()}`}>
            Edit row
          </ButtonLink>
        </Actions>
      )}
      <RowInspector row={row} {...shown} />
    </>
  );
}
