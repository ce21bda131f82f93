'use client';

import { type PointerEvent, useRef } from 'react';
import { type Sheet } from '@/components/three-views/sheet';
import { type Region, regionBetween } from '@/lib/three-views/region';

interface BrushOptions {
  readonly sheet: Sheet;
  readonly region: Region;
  /** While it is drawn. */
  readonly onDraft: (region: Region | null) => void;
  /** Drawn; null after a press without a drag. */
  readonly onDrawn: (region: Region | null, at: readonly [number, number]) => void;
  /** The pointer passes a place on the sheet, metres to the right and upwards, with the metres of a pixel; null as it leaves. */
  readonly onPass: (at: readonly [number, number] | null, pixel: number) => void;
}

/** Pixels that make a press a drag. */
const DRAG = 5;

/** Drawing a rectangle on a view: a new region, or with Shift a narrower one, which keeps the range along the line of sight. */
export function useBrush({ sheet, region, onDraft, onDrawn, onPass }: BrushOptions) {
  const start = useRef<{ readonly x: number; readonly y: number; readonly dragged: boolean } | null>(null);
  const placeOf = (event: PointerEvent<SVGSVGElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    const share = (at: number, from: number, size: number) => Math.min(1, Math.max(0, (at - from) / size));
    const metres = (x: number, y: number) =>
      sheet.metres(share(x, box.left, box.width), share(y, box.top, box.height));
    return { metres, pixel: sheet.width / box.width };
  };
  const drawn = (
    event: PointerEvent<SVGSVGElement>,
    from: { readonly x: number; readonly y: number },
  ): Region => {
    const { metres } = placeOf(event);
    return regionBetween(
      metres(from.x, from.y),
      metres(event.clientX, event.clientY),
      sheet.axes,
      event.shiftKey ? region : undefined,
    );
  };
  return {
    onPointerDown: (event: PointerEvent<SVGSVGElement>) => {
      if (event.button !== 0) return;
      event.currentTarget.setPointerCapture(event.pointerId);
      start.current = { x: event.clientX, y: event.clientY, dragged: false };
      event.preventDefault();
    },
    onPointerMove: (event: PointerEvent<SVGSVGElement>) => {
      const from = start.current;
      const { metres, pixel } = placeOf(event);
      if (from === null) {
        onPass(metres(event.clientX, event.clientY), pixel);
        return;
      }
      const far = Math.hypot(event.clientX - from.x, event.clientY - from.y) > DRAG;
      if (!from.dragged && !far) return;
      start.current = { ...from, dragged: true };
      onDraft(drawn(event, from));
    },
    onPointerUp: (event: PointerEvent<SVGSVGElement>) => {
      const from = start.current;
      start.current = null;
      if (from === null) return;
      onDraft(null);
      const { metres, pixel } = placeOf(event);
      const at = metres(event.clientX, event.clientY);
      if (!from.dragged) onPass(at, pixel);
      onDrawn(from.dragged ? drawn(event, from) : null, at);
    },
    onPointerCancel: () => {
      start.current = null;
      onDraft(null);
    },
    // A finger leaves as it lifts; what it touched stays read.
    onPointerLeave: (event: PointerEvent<SVGSVGElement>) => {
      if (event.pointerType === 'mouse') onPass(null, 0);
    },
  };
}
