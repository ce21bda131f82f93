import { type AxisTriple } from './axes';
import { type IssueChange, NO_CHANGE, changeFromFormer, followedBy, reversed } from './issue-change';
import { type Pose } from './pose';

/** A frame issue as a link of its program's chain. */
export interface IssueLink {
  readonly number: number;
  readonly axes: AxisTriple;
  /** How the frame of the issue before lies in this one; null for the first, and for an issue that was made without stating it. */
  readonly former: Pose | null;
}

/** The issues of one program, by number, and how to get from any of them to any other. */
export class IssueChain {
  readonly #links: readonly IssueLink[];

  constructor(links: readonly IssueLink[]) {
    this.#links = [...links].sort((a, b) => a.number - b.number);
  }

  /**
   * The change from one issue to another, composed of the steps between them; null where one of them does not say how it lies
   * against the one before, so that nobody knows.
   * @throws RangeError for a number that is not an issue of this program.
   */
  between(from: number, to: number): IssueChange | null {
    if (from > to) {
      const there = this.between(to, from);
      return there && reversed(there);
    }
    const start = this.#links.findIndex(({ number }) => number === from);
    const end = this.#links.findIndex(({ number }) => number === to);
    if (start < 0 || end < 0) throw new RangeError(`there is no frame issue ${start < 0 ? from : to}`);
    let change = NO_CHANGE;
    for (let at = start + 1; at <= end; at += 1) {
      const [before, link] = [this.#links[at - 1], this.#links[at]];
      if (before === undefined || !link?.former) return null;
      change = followedBy(change, changeFromFormer(before.axes, link.former, link.axes));
    }
    return change;
  }

  /** The first issue after `from`, on the way to `to`, that does not say how it lies against the one before; null where all do. */
  gapBetween(from: number, to: number): number | null {
    const [low, high] = [Math.min(from, to), Math.max(from, to)];
    const gap = this.#links.find(({ number, former }) => number > low && number <= high && former === null);
    return gap?.number ?? null;
  }
}
