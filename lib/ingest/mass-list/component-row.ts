import { type Cells } from '@/lib/ingest/table/cells';
import {
  type ListColumn,
  type ScaledColumn,
  type Scales,
  type SigmaColumn,
  MOMENTS,
  VALUES,
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
const PAIR = ['pair'] as const;

/** Reads the rows that `cells` is loaded with, one after another. */
export class ComponentRows {
  private readonly adjustments: boolean;
  private readonly half: boolean;
  private groupText: string | null = null;
  private group = DEFAULT_GROUP;

  constructor(
    private readonly cells: Cells<ListColumn>,
    private readonly scales: Scales,
    { kind, extent }: Pick<ListDeclarations, 'kind' | 'extent'>,
  ) {
    this.adjustments = kind === 'adjustments';
    this.half = extent !== 'whole';
  }

  /** The present row as a component in SI, or null when something in it is wrong (which is in the log). */
  read(): Component | null {
    const { cells } = this;
    const before = cells.problems;
    const item = cells.neededText(cells.has('item') ? 'item' : 'part_number');
    const category = cells.choice('category', CATEGORIES) ?? 'empty';
    const counting = cells.choice('counting', COUNTINGS) ?? 'counted';
    const quantity = cells.count('quantity') ?? 1;
    const mass = this.needed('mass');
    const position = [this.needed('x'), this.needed('y'), this.needed('z')] as const;
    const moments = {
      ixx: this.value('ixx') ?? 0,
      iyy: this.value('iyy') ?? 0,
      izz: this.value('izz') ?? 0,
      ixy: this.value('ixy') ?? 0,
      ixz: this.value('ixz') ?? 0,
      iyz: this.value('iyz') ?? 0,
    };
    const orientation = {
      yaw: this.value('yaw') ?? 0,
      pitch: this.value('pitch') ?? 0,
      roll: this.value('roll') ?? 0,
    };
    const pair = cells.choice('symmetry', PAIR) === 'pair';
    const maturity = cells.choice('maturity', MATURITIES) ?? null;
    const growth = this.value('growth_percent');
    const sigma = this.readSigma();
    const status = this.adjustments ? (cells.choice('status', CHANGE_STATUSES) ?? 'approved') : 'approved';

    checkMass(cells, mass, moments, this.adjustments);
    this.checkPairAndGrowth(pair, growth);
    if (item === null || cells.problems > before) return null;
    return {
      item,
      partNumber: cells.text('part_number'),
      partRevision: cells.text('part_revision'),
      description: cells.text('description'),
      group: this.groupOf(cells.text('group')),
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
      changeRef: this.adjustments ? cells.text('change_ref') : null,
      status,
      extra: cells.own(),
    };
  }

  private value(column: ScaledColumn): number | null {
    const number = this.cells.number(column);
    return number === null || number === undefined ? null : scaled(number, this.scales[column]);
  }

  private needed(column: ScaledColumn): number {
    const number = this.cells.neededNumber(column);
    return number === undefined ? NaN : scaled(number, this.scales[column]);
  }

  private readSigma(): ComponentSigma | null {
    const sigma = {
      mass: this.sigma('mass_sigma'),
      x: this.sigma('x_sigma'),
      y: this.sigma('y_sigma'),
      z: this.sigma('z_sigma'),
      ixx: this.sigma('ixx_sigma'),
      iyy: this.sigma('iyy_sigma'),
      izz: this.sigma('izz_sigma'),
      ixy: this.sigma('ixy_sigma'),
      ixz: this.sigma('ixz_sigma'),
      iyz: this.sigma('iyz_sigma'),
    };
    for (const name of VALUES) if (sigma[name] !== null) return sigma;
    return null;
  }

  private sigma(column: SigmaColumn): number | null {
    const number = this.cells.number(column);
    if (number === null || number === undefined) return null;
    if (number < 0) {
      const message = `${this.cells.quoted(column)} is negative. An uncertainty is zero or more.`;
      this.cells.problem('negative-sigma', column, message);
    }
    return scaled(number, this.scales[column]);
  }

  private checkPairAndGrowth(pair: boolean, growth: number | null): void {
    const { cells } = this;
    if (pair && this.half) {
      const message =
        'A list of one half is mirrored whole, so a `pair` in it would count twice. Leave it blank.';
      cells.problem('pair-in-half-list', 'symmetry', message);
    }
    if (growth !== null && growth <= -1) {
      const message = `${cells.quoted('growth_percent')} % would leave no mass. Write the allowance in percent of the mass.`;
      cells.problem('growth-too-small', 'growth_percent', message);
    }
  }

  /** Neighbours are mostly of one group, so its path is worked out once. */
  private groupOf(text: string | null): string {
    if (text !== this.groupText) {
      this.groupText = text;
      this.group = groupPath(text);
    }
    return this.group;
  }
}

/** A path with `/`, its parts trimmed and blank ones left out. */
export function groupPath(text: string | null): string {
  const parts = (text ?? '').split('/').map((part) => part.trim());
  return parts.filter((part) => part !== '').join('/') || DEFAULT_GROUP;
}

/** Signs of mass and own tensor (domain section 5: a removal has both negative). */
function checkMass(cells: Cells<ListColumn>, mass: number, moments: Moments, adjustment: boolean): void {
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
