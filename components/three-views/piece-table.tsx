'use client';

import { ON_BOARD } from '@/lib/three-views/group-key';
import { useMemo } from 'react';
import { type DataColumn } from '@/components/data-table/column';
import { DataTable } from '@/components/data-table/data-table';
import { useUrlView } from '@/components/data-table/use-url-view';
import { CATEGORY_WORDS } from '@/components/configurations/category-words';
import { type CellValue } from '@/components/data-table/column';
import { TextLink } from '@/components/ui/text-link';
import { type Picture, type Piece } from '@/lib/three-views/picture';
import { sumsOf } from '@/lib/three-views/sums';
import { fromSi } from '@/lib/units/convert';
import { type OutputUnits, unitLabel } from '@/lib/units/names';

interface PieceTableProps {
  readonly picture: Picture;
  readonly pieces: readonly Piece[];
  readonly units: OutputUnits;
  /** Where the lists of the program are. */
  readonly listsHref: string;
  readonly exportName: string;
}

const pieceId = (piece: Piece): string =>
  `${piece.row.list ?? 'board'} ${piece.row.cell ? piece.place.join(' ') : piece.row.item} ${piece.image ? 'image' : ''}`;

/** The row in its list, found and open. */
export function rowHref(listsHref: string, picture: Picture, piece: Piece): string | null {
  const list = piece.row.list === null ? undefined : picture.lists[piece.row.list];
  if (list === undefined || piece.row.cell) return null;
  const query = new URLSearchParams({
    revision: String(list.revision),
    find: piece.row.item,
    row: piece.row.item,
  });
  return `${listsHref}/${list.code}?${query.toString()}#rows`;
}

/** Everything that is marked, a line for each mark, with the mass and CG of it all in the foot. */
export function PieceTable({ picture, pieces, units, listsHref, exportName }: PieceTableProps) {
  const [view, onView] = useUrlView();
  const columns = useMemo(() => pieceColumns(picture, units, listsHref), [picture, units, listsHref]);
  return (
    <DataTable
      caption="Components"
      columns={columns}
      rows={pieces}
      rowId={pieceId}
      view={view}
      onView={onView}
      of="marks"
      exportName={exportName}
    />
  );
}

function pieceColumns(picture: Picture, units: OutputUnits, listsHref: string): readonly DataColumn<Piece>[] {
  const { geometry, total, lists } = picture;
  const { mass: massUnit, length } = units;
  const sums = (pieces: readonly Piece[]) => sumsOf(pieces, geometry.reference);
  const text = (id: string, title: string, width: number, value: (piece: Piece) => CellValue) => ({
    id,
    title,
    width,
    kind: 'text' as const,
    value,
  });
  const along = (k: 0 | 1 | 2): DataColumn<Piece> => ({
    id: 'xyz'.charAt(k),
    title: `${'xyz'.charAt(k)} ${geometry.axes[k]}`,
    unit: unitLabel(length),
    kind: 'number',
    decimals: length === 'in' ? 2 : 3,
    width: 112,
    value: ({ place }) => fromSi(place[k], length),
    total: (pieces) => {
      const { cg } = sums(pieces);
      return cg === null ? null : fromSi(cg[k], length);
    },
  });
  return [
    {
      ...text('item', 'Item', 168, ({ row }) => row.item),
      cell: (piece) => {
        const href = rowHref(listsHref, picture, piece);
        return href === null ? piece.row.item : <TextLink href={href}>{piece.row.item}</TextLink>;
      },
    },
    text('description', 'Description', 224, ({ row }) => row.description),
    text('list', 'List', 152, ({ row }) =>
      row.list === null ? 'Items on board' : (lists[row.list]?.title ?? null),
    ),
    text('group', 'Group', 176, ({ row }) => (row.group === ON_BOARD ? null : row.group)),
    text('category', 'Category', 128, ({ row }) =>
      row.category === null ? null : CATEGORY_WORDS[row.category],
    ),
    text('piece', 'Piece', 120, ({ row, image }) =>
      row.cell ? 'taken together' : image ? 'mirror image' : row.list === null ? 'on board' : 'as listed',
    ),
    {
      id: 'mass',
      title: 'Mass',
      unit: unitLabel(massUnit),
      kind: 'number',
      decimals: 3,
      value: ({ mass }) => fromSi(mass, massUnit),
      total: (pieces) => fromSi(sums(pieces).mass, massUnit),
    },
    along(0),
    along(1),
    along(2),
    {
      id: 'share',
      title: 'Share of mass',
      unit: '%',
      kind: 'number',
      decimals: 3,
      width: 128,
      value: ({ mass }) => share(mass, total.mass),
      total: (pieces) => share(sums(pieces).mass, total.mass),
    },
  ];
}

const share = (mass: number, whole: number): number | null => (whole > 0 ? (100 * mass) / whole : null);
