import { type Component } from '@/lib/mass/component';
import { asTyped } from '@/lib/units/convert';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { FACTORS, type LengthUnit, type MassUnit } from '@/lib/units/table';
import { cellText, type GridRow } from './grid';
import { readHeading } from './heading';
import { type Mapping, positionOf } from './mapping';
import { readStyled } from './number-style';
import { columnNamed } from './words';

/** A figure of a totals row beside what the rows amount to, both in the unit that the file states it in. */
export interface TotalFigure {
  readonly line: number;
  /** The heading of its column. */
  readonly heading: string;
  readonly what: 'mass' | 'x' | 'y' | 'z';
  readonly unit: string;
  readonly stated: number;
  readonly computed: number;
  readonly agrees: boolean;
}

interface Sum {
  rows: number;
  mass: number;
  /** With mirror images counted too. */
  paired: number;
  first: [number, number, number];
}

const empty = (): Sum => ({ rows: 0, mass: 0, paired: 0, first: [0, 0, 0] });
const PLACES = ['x', 'y', 'z'] as const;

/**
 * Holds totals rows against the rows before them: since the beginning, or since the last total or title. A mass agrees within half a
 * unit of its last digit and a unit of the rows' last digit times the square root of their number, which is what rounding of rows
 * does (three standard deviations of a sum of uniform errors are 0.87 of that); a CG within the last digits of both.
 */
export class TotalsCheck {
  private readonly all = empty();
  private part = empty();
  private anyPair = false;
  private readonly digits = { mass: 0, x: 0, y: 0, z: 0 };

  constructor(
    private readonly mapping: Mapping,
    private readonly declarations: Pick<ListDeclarations, 'massUnit' | 'lengthUnit'>,
  ) {}

  add(component: Component, row: GridRow): void {
    for (const what of ['mass', ...PLACES] as const) {
      const cell = row.cells[positionOf(this.mapping.columns, what)];
      this.digits[what] = Math.max(this.digits[what], decimals(cellText(cell), this.mapping.numbers.decimal));
    }
    if (component.counting !== 'counted') return;
    const mass = component.mass * component.quantity;
    this.anyPair ||= component.pair;
    for (const sum of [this.all, this.part]) {
      sum.rows += 1;
      sum.mass += mass;
      sum.paired += component.pair ? 2 * mass : mass;
      component.position.forEach((place, k) => {
        sum.first[k as 0 | 1 | 2] += mass * place;
      });
    }
  }

  /** A title between rows: what follows may have a total of its own. */
  divide(): void {
    this.part = empty();
  }

  /** The figures of a totals row that can be held against the rows. */
  check(row: GridRow): TotalFigure[] {
    const found = this.statedMass(row);
    const figures: TotalFigure[] = [];
    const sum = found === null ? this.all : this.nearest(found.kg);
    if (found !== null) {
      const { unit, value, column, kg } = found;
      const factor = FACTORS[unit].times / FACTORS[unit].over;
      const rounding =
        0.5 * 10 ** -found.digits + 10 ** -this.digits.mass * this.unitRatio(unit) * Math.sqrt(sum.rows);
      const nearer = Math.abs(sum.paired - kg) < Math.abs(sum.mass - kg) ? sum.paired : sum.mass;
      const agrees = Math.abs(nearer - kg) / factor <= rounding + 1e-9 * Math.abs(value);
      figures.push({
        line: row.line,
        heading: this.heading(column),
        what: 'mass',
        unit,
        stated: value,
        computed: asTyped(nearer, unit),
        agrees,
      });
    }
    if (!this.anyPair && sum.mass > 0) {
      for (const [k, what] of PLACES.entries())
        figures.push(...this.checkPlace(row, what, sum.first[k as 0 | 1 | 2] / sum.mass));
    }
    this.part = empty();
    return figures;
  }

  private checkPlace(row: GridRow, what: 'x' | 'y' | 'z', computed: number): TotalFigure[] {
    const column = positionOf(this.mapping.columns, what);
    const text = cellText(row.cells[column]);
    const value = this.number(row, column);
    if (value === null) return [];
    const unit = this.unitOf<LengthUnit>(column, this.declarations.lengthUnit);
    const shown = asTyped(computed, unit);
    const rounding = 0.5 * 10 ** -decimals(text, this.mapping.numbers.decimal) + 10 ** -this.digits[what];
    const agrees = Math.abs(shown - value) <= rounding + 1e-9 * Math.abs(value);
    return [
      { line: row.line, heading: this.heading(column), what, unit, stated: value, computed: shown, agrees },
    ];
  }

  private nearest(kg: number): Sum {
    const far = ({ mass, paired }: Sum): number => Math.min(Math.abs(mass - kg), Math.abs(paired - kg));
    return this.part.rows > 0 && far(this.part) < far(this.all) ? this.part : this.all;
  }

  /** In the mass column, or in one for all pieces of a row that is kept beside it. */
  private statedMass(
    row: GridRow,
  ): { column: number; unit: MassUnit; value: number; kg: number; digits: number } | null {
    const mass = positionOf(this.mapping.columns, 'mass');
    const extended = this.mapping.columns.flatMap(({ heading, to }, index) =>
      to.use !== 'column' && columnNamed(readHeading(heading).name)?.allPieces === true ? [index] : [],
    );
    for (const column of [...extended, mass]) {
      const value = this.number(row, column);
      if (value === null) continue;
      const headed = readHeading(this.heading(column)).unit;
      const own = this.unitOf<MassUnit>(mass, this.declarations.massUnit);
      const unit = column !== mass && isMass(headed) ? headed : own;
      const { times, over } = FACTORS[unit];
      return {
        column,
        unit,
        value,
        kg: (value * times) / over,
        digits: decimals(cellText(row.cells[column]), this.mapping.numbers.decimal),
      };
    }
    return null;
  }

  private number(row: GridRow, column: number): number | null {
    const cell = row.cells[column];
    if (typeof cell === 'number') return cell;
    const text = cellText(cell);
    const value = text === '' ? null : readStyled(text, this.mapping.numbers);
    return typeof value === 'number' ? value : null;
  }

  private unitOf<U extends string>(column: number, declared: U): U {
    const to = this.mapping.columns[column]?.to;
    return to?.use === 'column' && to.unit !== null ? (to.unit as U) : declared;
  }

  /** How large a unit of the mass column is in the unit of a total. */
  private unitRatio(unit: MassUnit): number {
    const own =
      FACTORS[this.unitOf<MassUnit>(positionOf(this.mapping.columns, 'mass'), this.declarations.massUnit)];
    return ((own.times / own.over) * FACTORS[unit].over) / FACTORS[unit].times;
  }

  private heading(column: number): string {
    return this.mapping.columns[column]?.heading ?? '';
  }
}

function isMass(unit: string | null): unit is MassUnit {
  return unit === 'kg' || unit === 'g' || unit === 'lb' || unit === 'slug';
}

/** Digits after the decimal mark; a workbook's number of many digits is as exact as it is. */
function decimals(text: string, mark: string): number {
  const at = Math.max(
    text.lastIndexOf(mark),
    text.lastIndexOf('.') !== -1 && mark === '.' ? text.lastIndexOf('.') : -1,
  );
  return at === -1 ? 0 : Math.min(12, (/^\d*/u.exec(text.slice(at + 1))?.[0] ?? '').length);
}
