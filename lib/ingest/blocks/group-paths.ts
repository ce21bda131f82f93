import { restoreFormula } from '@/lib/export/formula-text';
import { DEFAULT_GROUP, groupPath } from '@/lib/ingest/mass-list/component-row';
import { isSame } from './bytes';
import { hashOf } from './item-index';
import { fieldText } from './row-block';

/** The group paths of a list by number, 0 the default; a path is found by the bytes of its field. */
export class GroupPaths {
  /** The paths by their numbers. */
  readonly paths: string[] = [DEFAULT_GROUP];
  readonly #numbers = new Map([[DEFAULT_GROUP, 0]]);
  readonly #spellings = new Map<number, { readonly bytes: Uint8Array; readonly number: number }[]>();
  /** The spelling of the field that was asked for last, and its number: neighbours are mostly of one group. */
  last: Uint8Array = new Uint8Array(0);
  lastNumber = -1;

  numberOfField(bytes: Uint8Array, start: number, end: number): number {
    const key = hashOf(bytes, start, end);
    const alike = this.#spellings.get(key) ?? [];
    let known = alike.find((each) => isSame(each.bytes, bytes, start, end));
    if (known === undefined) {
      const text = fieldText(bytes, start, end).trim();
      known = { bytes: bytes.slice(start, end), number: this.numberOf(groupPath(restoreFormula(text))) };
      alike.push(known);
      this.#spellings.set(key, alike);
    }
    this.last = known.bytes;
    this.lastNumber = known.number;
    return known.number;
  }

  numberOf(path: string): number {
    const known = this.#numbers.get(path);
    if (known !== undefined) return known;
    this.#numbers.set(path, this.paths.length);
    return this.paths.push(path) - 1;
  }
}
