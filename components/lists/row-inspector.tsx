import { OwnTensor } from '@/components/lists/own-tensor';
import { rowFieldGroups, type RowField, type RowFieldGroup } from '@/components/lists/row-fields';
import { useFrameInForce } from '@/components/lists/frame-in-force';
import { placeInAirframe, placeInForce } from '@/components/lists/row-place';
import { RowShares, type WholeOnPage } from '@/components/lists/row-shares';
import { RowViews } from '@/components/lists/row-views';
import { DefinitionList, type Definition } from '@/components/ui/definition-list';
import { type ListRow } from '@/lib/contracts/list-rows';
import { type AirframeVec } from '@/lib/frames/tags';
import { fromNumbers } from '@/lib/mass/account';
import { wholeOf } from '@/lib/mass/contributions/contribution';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { addVec } from '@/lib/numerics/vec3';

interface RowInspectorProps {
  readonly row: ListRow;
  readonly declarations: ListDeclarations;
  readonly geometry: AirframeGeometry;
  /** What the row is part of: the revision first, then conditions of configurations that pin it. */
  readonly wholes: readonly WholeOnPage[];
  /** The file that the revision was read from; null when it was made by edits. */
  readonly file: string | null;
}

/** What one row says, in full: fields that hold something, its own tensor, its place in the airframe, where it came from. */
export function RowInspector({ row, declarations, geometry, wholes, file }: RowInspectorProps) {
  const own = Object.entries(row.own);
  const inForce = useFrameInForce();
  const fieldGroups = rowFieldGroups(declarations);
  const group = ({ title, fields }: RowFieldGroup) => (
    <Fields key={title} title={title} items={fields.flatMap((field) => stated(field, row))} />
  );
  return (
    <div className="grid gap-6">
      <header className="grid gap-1">
        <h3 className="text-lead font-semibold wrap-anywhere">{String(row.cells.item ?? '')}</h3>
        <p className="text-note text-ink-2">
          {file === null ? 'As edited or brought back' : `As in ${file}`}
        </p>
      </header>
      {fieldGroups.slice(0, 2).map(group)}
      <RowViews {...{ row, declarations, geometry }} cg={cgOf(wholes[0], geometry)} />
      <RowShares {...{ row, declarations, geometry, wholes }} />
      {fieldGroups.slice(2).map(group)}
      <OwnTensor row={row} declarations={declarations} />
      <Fields title="Place in the airframe" items={placeInAirframe(row, declarations, geometry)} />
      {inForce === null ? null : (
        <Fields
          title={`Place in frame issue ${inForce.number}, in force`}
          items={placeInForce(row, declarations, geometry, inForce)}
        />
      )}
      <Fields title="Columns of the list's own" items={own.map(([term, value]) => ({ term, value }))} />
    </div>
  );
}

function cgOf(whole: WholeOnPage | undefined, geometry: AirframeGeometry): AirframeVec | null {
  const found = whole === undefined ? null : wholeOf(fromNumbers(whole.account), geometry);
  return found === null ? null : addVec(geometry.reference, found.cg);
}

function Fields({ title, items }: { readonly title: string; readonly items: readonly Definition[] }) {
  if (items.length === 0) return null;
  return (
    <section className="grid gap-1">
      <h4 className="font-semibold">{title}</h4>
      <DefinitionList items={items} />
    </section>
  );
}

function stated({ column, label, kind, unit }: RowField, row: ListRow): Definition[] {
  const cell = row.cells[column];
  if (cell === undefined || column === 'item') return [];
  const value = unit === undefined ? String(cell) : `${cell} ${unit}`;
  return [{ term: label, value: kind === 'number' ? <span className="num">{value}</span> : value }];
}
