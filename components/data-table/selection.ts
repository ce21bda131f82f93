/** A place among the shown lines and columns, counted from 0. */
export interface Place {
  readonly line: number;
  readonly column: number;
}

/** A rectangle of cells: it stays put at the anchor and grows to the head, which is the active cell. */
export interface Selection {
  readonly anchor: Place;
  readonly head: Place;
}

export interface Extent {
  readonly lines: number;
  readonly columns: number;
  /** Lines that one screen holds. */
  readonly screen: number;
}

export interface KeyPress {
  readonly key: string;
  readonly shift: boolean;
  readonly control: boolean;
}

export function at(line: number, column: number): Selection {
  return { anchor: { line, column }, head: { line, column } };
}

/** Where a key takes the selection; null when the key is not one that moves. */
export function moved(selection: Selection, press: KeyPress, extent: Extent): Selection | null {
  if (press.control && press.key.toLowerCase() === 'a') {
    return {
      anchor: { line: 0, column: 0 },
      head: { line: extent.lines - 1, column: extent.columns - 1 },
    };
  }
  const target = step(selection.head, press, extent);
  if (!target) return null;
  const head = {
    line: clamp(target.line, extent.lines),
    column: clamp(target.column, extent.columns),
  };
  return press.shift ? { anchor: selection.anchor, head } : { anchor: head, head };
}

function step({ line, column }: Place, press: KeyPress, extent: Extent): Place | null {
  const far = extent.lines + extent.columns;
  switch (press.key) {
    case 'ArrowUp':
      return { line: press.control ? 0 : line - 1, column };
    case 'ArrowDown':
      return { line: press.control ? far : line + 1, column };
    case 'ArrowLeft':
      return { line, column: press.control ? 0 : column - 1 };
    case 'ArrowRight':
      return { line, column: press.control ? far : column + 1 };
    case 'Home':
      return { line: press.control ? 0 : line, column: 0 };
    case 'End':
      return { line: press.control ? far : line, column: far };
    case 'PageUp':
      return { line: line - extent.screen, column };
    case 'PageDown':
      return { line: line + extent.screen, column };
    default:
      return null;
  }
}

function clamp(value: number, count: number): number {
  return Math.max(0, Math.min(value, count - 1));
}

export interface Bounds {
  readonly top: number;
  readonly bottom: number;
  readonly left: number;
  readonly right: number;
}

export function bounds({ anchor, head }: Selection): Bounds {
  return {
    top: Math.min(anchor.line, head.line),
    bottom: Math.max(anchor.line, head.line),
    left: Math.min(anchor.column, head.column),
    right: Math.max(anchor.column, head.column),
  };
}

export function holds(box: Bounds, line: number, column: number): boolean {
  return line >= box.top && line <= box.bottom && column >= box.left && column <= box.right;
}
