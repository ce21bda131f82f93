import { type Cells } from '@/lib/ingest/table/cells';
import {
  type AngleName,
  type ListColumn,
  type ScaledColumn,
  type Scales,
  type ValueName,
  MOMENTS,
  scaled,
} from '@/lib/ingest/mass-list/columns';
import { type Moments } from '@/lib/frames/products';
import {
  CATEGORIES,
  CHANGE_STATUSES,
  type Component,
  type ComponentSigma,
  type Counting,
  MATURITIES,
} from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';

export const DEFAULT_GROUP = 'Ungrouped';
const COUNTINGS: readonly Counting[] = ['counted', 'memo'];

type ListCells = Cells<ListColumn>;

/** The row that `cells` holds as a component in SI, or null when something in it is wrong (which is in the log). */
export function readComponent(
  cells: ListCells,
  scales: Scales,
  declarations: Pick<ListDeclarations, 'kind' | 'extent'>,
  problemsSoFar: () => number,
): Component | null {
  const before = problemsSoFar();
  const adjustment = declarations.kind === 'adjustments';
  const value = (column: ScaledColumn): number | null => {
    const number = cells.number(column);
    return number === null || number === undefined ? null : scaled(number, scales[column]);
  };
  const needed = (column: ScaledColumn): number => {
    const number = cells.neededNumber(column);
    return number === undefined ? NaN : scaled(number, scales[column]);
  };

  const item = cells.neededText(cells.has('item') ? 'item' : 'part_number');
  const category = cells.choice('category', CATEGORIES) ?? 'empty';
  const counting = cells.choice('counting', COUNTINGS) ?? 'counted';
  const quantity = cells.count('quantity') ?? 1;
  const mass = needed('mass');
  const position = [needed('x'), needed('y'), needed('z')] as const;
  const moments = {
    ixx: value('ixx') ?? 0,
    iyy: value('iyy') ?? 0,
    izz: value('izz') ?? 0,
    ixy: value('ixy') ?? 0,
    ixz: value('ixz') ?? 0,
    iyz: value('iyz') ?? 0,
  };
  const angle = (column: AngleName): number => value(column) ?? 0;
  const orientation = { yaw: angle('yaw'), pitch: angle('pitch'), roll: angle('roll') };
  const pair = cells.choice('symmetry', ['pair']) === 'pair';
  const maturity = cells.choice('maturity', MATURITIES) ?? null;
  const growth = value('growth_percent');
  const sigma = readSigma(cells, scales);
  const status = adjustment ? (cells.choice('status', CHANGE_STATUSES) ?? 'approved') : 'approved';

  checkMass(cells, mass, moments, adjustment);
  if (pair && declarations.extent !== 'whole') {
    const message =
      'A list of one half is mirrored whole, so a `pair` in it would count twice. Leave it blank.';
    cells.problem('pair-in-half-list', 'symmetry', message);
  }
  if (growth !== null && growth <= -1) {
    const message = `${cells.quoted('growth_percent')} % would leave no mass. Write the allowance in percent of the mass.`;
    cells.problem('growth-too-small', 'growth_percent', message);
  }
  if (item === null || problemsSoFar() > before) return null;
  return {
    item,
    partNumber: cells.text('part_number'),
    partRevision: cells.text('part_revision'),
    description: cells.text('description'),
    group: groupPath(cells.text('group')),
    category,
    parent: cells.text('parent'),
    counting,
    quantity,
    mass,
    position,
    moments,
    orientation,
    pair,
    maturity,
    growth,
    sigma,
    source: cells.text('source'),
    sourceDate: cells.text('source_date'),
    note: cells.text('note'),
    changeRef: adjustment ? cells.text('change_ref') : null,
    status,
    extra: cells.own(),
  };
}

/** A path with `/`, its parts trimmed and blank ones left out. */
export function groupPath(text: string | null): string {
  const parts = (text ?? '').split('/').map((part) => part.trim());
  return parts.filter((part) => part !== '').join('/') || DEFAULT_GROUP;
}

function readSigma(cells: ListCells, scales: Scales): ComponentSigma | null {
  let stated = false;
  const sigma = (name: ValueName): number | null => {
    const column = `${name}_sigma` as const;
    const number = cells.number(column);
    if (number === null || number === undefined) return null;
    stated = true;
    if (number < 0) {
      const message = `${cells.quoted(column)} is negative. An uncertainty is zero or more.`;
      cells.problem('negative-sigma', column, message);
    }
    return scaled(number, scales[column]);
  };
  const all = {
    mass: sigma('mass'),
    x: sigma('x'),
    y: sigma('y'),
    z: sigma('z'),
    ixx: sigma('ixx'),
    iyy: sigma('iyy'),
    izz: sigma('izz'),
    ixy: sigma('ixy'),
    ixz: sigma('ixz'),
    iyz: sigma('iyz'),
  };
  return stated ? all : null;
}

/** Signs of mass and own tensor (domain section 5: a removal has both negative). */
function checkMass(cells: ListCells, mass: number, moments: Moments, adjustment: boolean): void {
  if (mass < 0 && !adjustment) {
    const message =
      `${cells.quoted('mass')} is negative. Put removals into a list of kind adjustments, ` +
      'with mass and own moments of inertia negative.';
    cells.problem('negative-mass', 'mass', message);
  } else if (mass < 0) {
    for (const name of ['ixx', 'iyy', 'izz'] as const) {
      if (moments[name] <= 0) continue;
      const message =
        `The mass is negative and ${name} is positive (${cells.quoted(name)}). ` +
        'A removal has mass and own moments of inertia both negative.';
      cells.problem('removal-positive-moment', name, message);
    }
  } else if (mass === 0) {
    const name = MOMENTS.find((moment) => moments[moment] !== 0);
    if (name === undefined) return;
    const message = `The mass is zero and ${name} is ${cells.quoted(name)}. A row without mass has no inertia of its own.`;
    cells.problem('inertia-without-mass', name, message);
  }
}
