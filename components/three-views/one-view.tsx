'use client';

import { type CSSProperties, type ReactNode, useMemo } from 'react';
import {
  CgMark,
  ChordBar,
  chordEnds,
  Datum,
  FarDatum,
  PartCgMark,
  PointMarks,
  Sides,
} from '@/components/three-views/landmarks';
import { MarkLayer } from '@/components/three-views/mark-layer';
import { axisName, edgeTicks, LeftEdge, LowerEdge } from '@/components/three-views/ruled-edge';
import { type Sheet } from '@/components/three-views/sheet';
import { useBrush } from '@/components/three-views/use-brush';
import { Letters, ViewLabels } from '@/components/three-views/view-labels';
import { isWithin } from '@/lib/three-views/bounds';
import { type AirframeVec } from '@/lib/frames/tags';
import { type GroupKey } from '@/lib/three-views/group-key';
import { markRadius } from '@/lib/three-views/mark-size';
import { type Picture, type Piece } from '@/lib/three-views/picture';
import { isEverywhere, type Region } from '@/lib/three-views/region';
import { onSheet, SHEET } from '@/lib/three-views/views';
import { unitLabel } from '@/lib/units/names';
import { type LengthUnit } from '@/lib/units/table';

interface OneViewProps {
  readonly title: string;
  readonly sheet: Sheet;
  readonly picture: Picture;
  readonly keys: ReadonlyMap<string, GroupKey>;
  /** On the sheets. */
  readonly pieces: readonly Piece[];
  /** In the region; all of them without one. */
  readonly brushed: readonly Piece[];
  readonly region: Region;
  readonly passed: Piece | null;
  readonly unit: LengthUnit;
  readonly showPoints: boolean;
  /** Pixels per metre on a desk screen. */
  readonly scale: number;
  /** m, of the widest view: all views keep one scale when they are stacked. */
  readonly widest: number;
  /** The CG of what is brushed or filtered; null where that is everything, or has none. */
  readonly partCg: AirframeVec | null;
  readonly onDraft: (region: Region | null) => void;
  readonly onRegion: (region: Region | null) => void;
  readonly onPass: (piece: Piece | null) => void;
  /** Stands beneath it. */
  readonly children?: ReactNode;
}

/** One of the three views with its ruled edges. */
export function OneView(props: OneViewProps) {
  const { title, sheet, picture, keys, pieces, brushed, region, passed, unit, showPoints, scale, widest } =
    props;
  const { geometry, bounds, radiusOfOne, total, points } = picture;
  const { axes } = geometry;
  const whole = isEverywhere(region);
  const edge = { sheet, bounds, axes, unit };
  const named = useMemo(
    () => (showPoints ? points.filter(({ place }) => isWithin(place, bounds)) : []),
    [points, showPoints, bounds],
  );
  const chord = useMemo(() => (sheet.view === 'front' ? [] : chordEnds(geometry)), [sheet.view, geometry]);
  const nearest = (at: readonly [number, number], pixel: number): Piece | null => {
    let best: Piece | null = null;
    for (const piece of pieces) {
      const [u, v] = onSheet(piece.place, sheet.axes);
      const reach = Math.max(markRadius(piece.mass, radiusOfOne), 4 * pixel);
      if (Math.hypot(u - at[0], v - at[1]) > reach) continue;
      if (best === null || Math.abs(piece.mass) < Math.abs(best.mass)) best = piece;
    }
    return best;
  };
  const brush = useBrush({
    sheet,
    region,
    onDraft: props.onDraft,
    onPass: (at, pixel) => props.onPass(at === null ? null : nearest(at, pixel)),
    onDrawn: (drawn, at) => {
      if (drawn !== null) props.onRegion(drawn);
      else if (nearest(at, 0) === null) props.onRegion(null);
    },
  });
  const words = `${title}, seen ${SHEET[sheet.view].from}: ${axisName(axes, sheet.axes.across.index)} across, ${axisName(axes, sheet.axes.upward.index)} upwards, ${unitLabel(unit)}`;
  return (
    <figure
      className={`three-view view-${sheet.view}`}
      style={{ '--view': `${sheet.width}fr`, '--rest': `${widest - sheet.width}fr` } as CSSProperties}
    >
      <figcaption className="col-start-2 flex flex-wrap items-baseline gap-x-2 pb-1">
        <span className="font-semibold">{title}</span>
        <span className="text-note text-ink-2">
          seen {SHEET[sheet.view].from}. Left edge: {lowered(axisName(axes, sheet.axes.upward.index))},{' '}
          {unitLabel(unit)}
        </span>
      </figcaption>
      <div className="relative col-start-1 row-start-2">
        <LeftEdge {...edge} />
      </div>
      <svg
        {...brush}
        role="img"
        aria-label={`${words}. ${pieces.length} marks. The table below holds them all.`}
        width="100%"
        style={{ aspectRatio: `${sheet.width} / ${sheet.height}` }}
        className="col-start-2 row-start-2 block cursor-crosshair touch-pan-y border-t border-r border-rule bg-sheet select-none"
      >
        <Grid {...edge} />
        <Sides sheet={sheet} axes={axes} lateralPlane={geometry.lateralPlane} />
        <svg viewBox={`0 0 ${sheet.width} ${sheet.height}`} width="100%" height="100%">
          <MarkLayer {...{ sheet, pieces, keys, radiusOfOne }} faded={!whole} />
          {whole ? null : <MarkLayer {...{ sheet, keys, radiusOfOne }} pieces={brushed} />}
        </svg>
        <Letters {...{ sheet, keys, radiusOfOne, scale }} pieces={brushed} />
        <ChordBar sheet={sheet} geometry={geometry} />
        <PointMarks sheet={sheet} points={named} />
        <Datum sheet={sheet} bounds={bounds} />
        <FarDatum sheet={sheet} bounds={bounds} unit={unit} />
        <ViewLabels
          {...{ sheet, keys, radiusOfOne, scale, chord }}
          cg={total.cg}
          points={named}
          pieces={brushed}
        />
        {props.partCg === null ? null : <PartCgMark sheet={sheet} cg={props.partCg} />}
        {total.cg === null ? null : <CgMark sheet={sheet} cg={total.cg} />}
        <RegionFrame sheet={sheet} region={region} />
        {passed === null ? null : <Passed sheet={sheet} piece={passed} radiusOfOne={radiusOfOne} />}
      </svg>
      <div className="col-start-2 row-start-3 min-w-0">
        <LowerEdge {...edge} />
        {props.children}
      </div>
    </figure>
  );
}

const lowered = (words: string): string => `${words.charAt(0).toLowerCase()}${words.slice(1)}`;

function Grid({
  sheet,
  bounds,
  unit,
}: {
  readonly sheet: Sheet;
  readonly bounds: Picture['bounds'];
  readonly unit: LengthUnit;
}) {
  const [across, upward] = [
    edgeTicks(sheet, 'across', bounds, unit),
    edgeTicks(sheet, 'upward', bounds, unit),
  ];
  return (
    <g>
      {across.ticks.labelled.map((tick) => {
        const x = `${100 * across.share(tick)}%`;
        return <line key={tick} x1={x} x2={x} y1="0" y2="100%" className="stroke-rule" opacity="0.55" />;
      })}
      {upward.ticks.labelled.map((tick) => {
        const y = `${100 * upward.share(tick)}%`;
        return <line key={tick} x1="0" x2="100%" y1={y} y2={y} className="stroke-rule" opacity="0.55" />;
      })}
    </g>
  );
}

/** The brushed region as this view sees it. */
function RegionFrame({ sheet, region }: { readonly sheet: Sheet; readonly region: Region }) {
  const { across, upward } = sheet.axes;
  const [a, b] = [region[across.index], region[upward.index]];
  if (a === null && b === null) return null;
  const [left, top] = sheet.metres(0, 0);
  const [right, bottom] = sheet.metres(1, 1);
  const within = (value: number, low: number, high: number): number => Math.min(high, Math.max(low, value));
  const u = a === null ? [left, right] : a.map((end) => within(across.sign * end, left, right));
  const v = b === null ? [bottom, top] : b.map((end) => within(upward.sign * end, bottom, top));
  const [x1, x2] = [Math.min(...u) - left, Math.max(...u) - left];
  const [y1, y2] = [top - Math.max(...v), top - Math.min(...v)];
  return (
    <rect
      x={`${(100 * x1) / sheet.width}%`}
      y={`${(100 * y1) / sheet.height}%`}
      width={`${(100 * (x2 - x1)) / sheet.width}%`}
      height={`${(100 * (y2 - y1)) / sheet.height}%`}
      className="pointer-events-none fill-none stroke-spin"
      strokeWidth="2"
      strokeDasharray="6 3"
    />
  );
}

function Passed({
  sheet,
  piece,
  radiusOfOne,
}: {
  readonly sheet: Sheet;
  readonly piece: Piece;
  readonly radiusOfOne: number;
}) {
  const { x, y } = sheet.percent(piece.place);
  const radius =
    (100 * markRadius(piece.mass, radiusOfOne)) / Math.sqrt((sheet.width ** 2 + sheet.height ** 2) / 2);
  return (
    <g className="pointer-events-none fill-none">
      <circle
        cx={`${x}%`}
        cy={`${y}%`}
        r={`${Math.max(radius, 0.5)}%`}
        className="stroke-sheet"
        strokeWidth="5"
      />
      <circle
        cx={`${x}%`}
        cy={`${y}%`}
        r={`${Math.max(radius, 0.5)}%`}
        className="stroke-spin"
        strokeWidth="3"
      />
    </g>
  );
}
