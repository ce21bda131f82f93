import { type RowBlock } from '@/lib/ingest/blocks/row-block';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry, bareGeometry } from '@/lib/mass/geometry';
import { Placement } from '@/lib/mass/place';
import { type RollUp } from '@/lib/mass/roll-up';

import { CheckBlock } from './columns/check-block';
import { type RowChange, type RowContext } from './context';
import { type Finding, type Severity } from './finding';
import { RowFacts } from './row-facts';
import { type RotatingParts, type Rule, type Sighting } from './rule';
import { ROTOR_RULES, ROW_RULES, WHOLE_RULES } from './rules';
import { SharedBooks } from './shared-books';

const ORDER: Readonly<Record<Severity, number>> = { blocker: 0, warning: 1, note: 2 };

/** Blockers first, then warnings, then notes. */
export function bySeverity(a: Finding, b: Finding): number {
  return ORDER[a.severity] - ORDER[b.severity];
}

function findingsOf(seen: readonly (readonly [Rule, Sighting | null])[]): Finding[] {
  return seen
    .flatMap(([{ id, severity }, sighting]) =>
      sighting === null ? [] : [{ rule: id, severity, ...sighting }],
    )
    .sort(bySeverity);
}

/** Shows every row of one list to every row rule, one row at a time. */
export class RowChecks {
  readonly #placement: Placement;
  readonly #watches;
  readonly #context: RowContext;
  #block: CheckBlock | null = null;

  constructor(
    readonly declarations: ListDeclarations,
    context: RowContext = {},
  ) {
    const geometry = context.geometry ?? bareGeometry(declarations.axes, [0, 0, 0]);
    const placement = new Placement(declarations, geometry);
    const books = new SharedBooks();
    this.#placement = placement;
    this.#context = context;
    this.#watches = ROW_RULES.map((rule) => [rule, rule.watch({ ...context, placement, books })] as const);
  }

  /** Shows a row; rows come either so, or in blocks. */
  see(component: Component): void {
    const row = new RowFacts(component, this.#placement);
    for (const [, watch] of this.#watches) watch.see(row);
  }

  /** Shows the rows of a block, always the same one. */
  seeBlock(rows: RowBlock): void {
    this.#block ??= new CheckBlock(rows, this.#placement, this.#context);
    const block = this.#block;
    block.load();
    for (const [, watch] of this.#watches) {
      if (watch.block !== undefined) watch.block(block);
      else for (let row = 0; row < rows.rows; row += 1) watch.see(block.facts(row));
    }
  }

  /** After the last row, before `findings`: a row whose figures changed since the revision before, in any order. */
  seeChange(change: RowChange): void {
    for (const [, watch] of this.#watches) watch.change?.(change);
  }

  /** After the last row: blockers first. */
  findings(): Finding[] {
    return findingsOf(this.#watches.map(([rule, watch]) => [rule, watch.report()]));
  }
}

/** Findings on a rolled-up condition: blockers first. */
export function findingsOnWhole(whole: RollUp, geometry: AirframeGeometry): Finding[] {
  return findingsOf(WHOLE_RULES.map((rule) => [rule, rule.look(whole, geometry)]));
}

/** Findings on rotating parts and their operating points: blockers first. */
export function findingsOnRotors(parts: RotatingParts): Finding[] {
  return findingsOf(ROTOR_RULES.map((rule) => [rule, rule.look(parts)]));
}
