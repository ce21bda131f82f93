import { type AirframeVec } from '@/lib/frames/tags';
import { type Category } from '@/lib/mass/component';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type Bounds } from './bounds';
import { type GroupKey } from './group-key';

/** A row of a list, an item on board, or the small rows of a cell taken together. */
export interface PictureRow {
  readonly item: string;
  readonly description: string | null;
  /** Of `Picture.lists`; null for an item on board. */
  readonly list: number | null;
  readonly group: string;
  /** Null where it is not known, or not one. */
  readonly category: Category | null;
  /** kg, of the pieces at each of its places. */
  readonly mass: number;
  /** From the datum, m: as listed, then the mirror image of a pair or of a row of a half list. */
  readonly places: readonly AirframeVec[];
  /** List rows that it stands for: 1, or those of a cell. */
  readonly rows: number;
  readonly cell: boolean;
}

export interface PictureList {
  readonly code: string;
  readonly title: string;
  readonly revision: number;
}

export interface NamedPlace {
  readonly code: string;
  readonly title: string | null;
  readonly place: AirframeVec;
}

/** What the three views of one condition are drawn from. SI, airframe components from the datum. */
export interface Picture {
  readonly geometry: Pick<AirframeGeometry, 'axes' | 'lateralPlane' | 'lemac' | 'mac' | 'reference'>;
  readonly bounds: Bounds;
  /** Radius of a mark of 1 kg, m: a mark's area goes with its mass. */
  readonly radiusOfOne: number;
  readonly groups: readonly GroupKey[];
  readonly lists: readonly PictureList[];
  readonly rows: readonly PictureRow[];
  /** Basic, of the whole condition whatever is filtered; `cg` null without a mass above zero. */
  readonly total: { readonly mass: number; readonly cg: AirframeVec | null };
  readonly points: readonly NamedPlace[];
  readonly left: LeftOut;
}

/** What is not drawn as a mark of its own, so that nothing goes without saying. */
export interface LeftOut {
  /** Rows that are shown and not summed. */
  readonly memo: number;
  /** Adjustments that are not approved. */
  readonly waiting: number;
  /** Rows whose category is not on board in this condition. */
  readonly ashore: number;
  /** Rows drawn together by cells, and their mass with the mirror images, kg. */
  readonly inCells: { readonly rows: number; readonly mass: number; readonly size: number } | null;
  /** Items on board that a category filter leaves out, because a signed baseline keeps none for them. */
  readonly uncategorised: number;
}

/** One mark: a row at one of its places. */
export interface Piece {
  readonly row: PictureRow;
  readonly place: AirframeVec;
  readonly mass: number;
  /** Of the mirror image. */
  readonly image: boolean;
}

export function piecesOf(rows: readonly PictureRow[]): Piece[] {
  return rows.flatMap((row) =>
    row.places.map((place, index) => ({ row, place, mass: row.mass, image: index > 0 })),
  );
}
