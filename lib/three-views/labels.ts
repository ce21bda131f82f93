/** Pixels, from the upper left corner. */
export interface Box {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

export interface Wish {
  readonly key: string;
  readonly x: number;
  readonly y: number;
  /** Half size of the mark that it names: the label stands beside it. */
  readonly clear: number;
  readonly width: number;
}

export interface PlacedLabel {
  readonly key: string;
  /** Where its text starts or ends, by `anchor`, on its base line. */
  readonly x: number;
  readonly y: number;
  readonly anchor: 'start' | 'middle' | 'end';
}

const HEIGHT = 14;

/**
 * Puts labels beside their marks, first come first served: right, left, above, below, the first of these that meets no other label
 * and stays on the sheet. A label without room is left out.
 */
export function placeLabels(
  wishes: readonly Wish[],
  taken: readonly Box[],
  sheet: { readonly width: number; readonly height: number },
): PlacedLabel[] {
  const boxes = [...taken];
  const placed: PlacedLabel[] = [];
  for (const { key, x, y, clear, width } of wishes) {
    const gap = clear + 4;
    const choices: readonly (readonly [PlacedLabel['anchor'], number, number])[] = [
      ['start', x + gap, y + 4],
      ['end', x - gap, y + 4],
      ['middle', x, y - gap - 1],
      ['middle', x, y + gap + 9],
    ];
    for (const [anchor, at, base] of choices) {
      const left = anchor === 'start' ? at : anchor === 'end' ? at - width : at - width / 2;
      const box = { left, right: left + width, top: base - 11, bottom: base - 11 + HEIGHT };
      const inside = box.left >= 0 && box.top >= 0 && box.right <= sheet.width && box.bottom <= sheet.height;
      if (!inside || boxes.some((other) => overlap(box, other))) continue;
      boxes.push(box);
      placed.push({ key, x: at, y: base, anchor });
      break;
    }
  }
  return placed;
}

const overlap = (a: Box, b: Box): boolean =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
