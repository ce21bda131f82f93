import type pg from 'pg';
import { type Transaction } from 'kysely';
import { type FormerRevision, sameFrame, suspectChanges } from '@/db/queries/former-revision';
import { type Database } from '@/db/schema/database';
import { type Finding } from '@/lib/findings/finding';
import { RowChecks } from '@/lib/findings/look';
import { type RowBlock } from '@/lib/ingest/blocks/row-block';
import { toNumbersWithRest } from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type GroupBreakdown } from '@/lib/groups/breakdown';
import { ColumnBook } from '@/lib/mass/columns/column-book';
import { Placement } from '@/lib/mass/place';
import { type Subtotal, SubtotalBook } from '@/lib/mass/subtotals';
import { UncertaintyBook, type UncertaintySubtotal } from '@/lib/mass/uncertainty/book';
import { toNumbers as uncertaintyNumbers } from '@/lib/mass/uncertainty/sums';
import { contentHead } from './content-hash';
import { type ListRows, RowStore, type StoredContent } from './row-store';

/** So many subtotals are stored by one statement, which takes 65 535 values at most. */
const SUBTOTALS = 1_000;

/** What a finished revision amounts to. */
export interface RevisionContent extends StoredContent {
  readonly memoRows: number;
  readonly pieces: number;
  readonly findings: readonly Finding[];
}

/** What a revision is before its first row. */
export interface OpenRevision {
  readonly id: string;
  readonly frame: { readonly id: string; readonly geometry: AirframeGeometry };
  readonly declarations: ListDeclarations;
  readonly former: FormerRevision | null;
  /** The breakdown of the program's groups. */
  readonly groups: GroupBreakdown;
}

/**
 * Writes the rows of one new revision: each goes to the database, into the subtotals, past the row rules and into the content
 * hash, and none is kept. The caller holds the transaction; until it commits nobody sees anything.
 */
export class RevisionWriter {
  readonly #book: SubtotalBook;
  readonly #uncertainty: UncertaintyBook;
  /** Instead of both where rows come in blocks. */
  #columns: ColumnBook | null = null;
  readonly #rules: RowChecks;

  private constructor(
    private readonly store: RowStore,
    private readonly list: ListRows,
    private readonly revisionId: string,
    private readonly frame: { readonly id: string; readonly geometry: AirframeGeometry },
    private readonly declarations: ListDeclarations,
    private readonly former: FormerRevision | null,
    groups: GroupBreakdown,
  ) {
    const placement = new Placement(declarations, frame.geometry);
    this.#book = new SubtotalBook(placement);
    this.#uncertainty = new UncertaintyBook(placement);
    this.#rules = new RowChecks(declarations, {
      geometry: frame.geometry,
      former: former?.subtotals,
      groups,
    });
  }

  /** `list` is held by the caller and as its newest revision left it; rows that stay as they are stored are not stored again. */
  static async open(client: pg.PoolClient, list: ListRows, revision: OpenRevision): Promise<RevisionWriter> {
    const store = await RowStore.open(client, list, contentHead(revision.declarations));
    return new RevisionWriter(
      store,
      list,
      revision.id,
      revision.frame,
      revision.declarations,
      revision.former,
      revision.groups,
    );
  }

  get rows(): number {
    return this.store.rows;
  }

  /**
   * From the first row on the connection speaks COPY: no other query on it until `finish` or `abort`. A promise only where the
   * database has to catch up.
   */
  add(component: Component): Promise<void> | undefined {
    if (this.#columns !== null) throw new Error('a revision is given in rows or in blocks');
    this.store.block.add(component);
    this.#book.add(component);
    this.#uncertainty.add(component);
    this.#rules.see(component);
    return this.store.took();
  }

  /** Instead of `add` for every row: the right rows of a block, which may be used again when the promise, if any, is kept. */
  addBlock(block: RowBlock): Promise<void> | undefined {
    for (let row = 0; row < block.rows; row += 1) this.store.block.addFrom(block, row);
    this.#rules.seeBlock(block);
    this.#columns ??= new ColumnBook(this.#book.placement);
    this.#columns.add(block);
    return this.store.took();
  }

  /** Closes the stream of rows, then stores the subtotals in `trx`, which must be on the same connection. */
  async finish(trx: Transaction<Database>): Promise<RevisionContent> {
    const stored = await this.store.finish();
    const subtotals = this.#columns?.subtotals() ?? this.#book.subtotals();
    const uncertainties = this.#columns?.uncertainties() ?? this.#uncertainty.sums();
    for (let at = 0; at < subtotals.length; at += SUBTOTALS) {
      await trx
        .insertInto('revision_subtotals')
        .values(
          subtotals.slice(at, at + SUBTOTALS).map((subtotal, index) => {
            const uncertainty = uncertainties[at + index];
            if (uncertainty === undefined) throw new Error('a subtotal without its uncertainty');
            return {
              revision_id: this.revisionId,
              frame_issue_id: this.frame.id,
              ...subtotalValues(subtotal),
              ...uncertaintyValues(uncertainty),
            };
          }),
        )
        .execute();
    }
    if (this.former !== null) await this.#holdAgainst(trx, this.former);
    const total = (count: (subtotal: Subtotal) => number): number =>
      subtotals.reduce((sum, subtotal) => sum + count(subtotal), 0);
    return {
      ...stored,
      memoRows: total((subtotal) => subtotal.memoRows),
      pieces: total((subtotal) => subtotal.pieces),
      findings: this.#rules.findings(),
    };
  }

  /** Rows against themselves in the revision before; places only where both revisions are stated in one frame. */
  async #holdAgainst(trx: Transaction<Database>, former: FormerRevision): Promise<void> {
    const isOneFrame = sameFrame(this.declarations, former.declarations);
    for (const { item, now, before } of await suspectChanges(trx, this.list))
      this.#rules.seeChange({
        item,
        now,
        before: isOneFrame ? before : { ...before, position: now.position },
      });
  }

  async abort(reason: Error): Promise<void> {
    await this.store.abort(reason);
  }
}

function subtotalValues(subtotal: Subtotal) {
  return {
    group_path: subtotal.group,
    category: subtotal.category,
    maturity: subtotal.maturity ?? ('' as const),
    status: subtotal.status,
    rows: subtotal.rows,
    pieces: subtotal.pieces,
    memo_rows: subtotal.memoRows,
    basic: [...toNumbersWithRest(subtotal.basic)],
    stated_predicted: [...toNumbersWithRest(subtotal.statedPredicted)],
    unstated_basic: [...toNumbersWithRest(subtotal.unstatedBasic)],
  };
}

function uncertaintyValues(uncertainty: UncertaintySubtotal) {
  return {
    basic_uncertainty: uncertaintyNumbers(uncertainty.basic),
    stated_predicted_uncertainty: uncertaintyNumbers(uncertainty.statedPredicted),
    unstated_basic_uncertainty: uncertaintyNumbers(uncertainty.unstatedBasic),
  };
}
