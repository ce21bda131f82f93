import { type ReactNode } from 'react';
import { numberText, plainText } from '@/components/mass/number-text';
import { type Sheet } from '@/components/three-views/sheet';
import { arrow, type AxisTriple } from '@/lib/frames/axes';
import { type AirframeVec } from '@/lib/frames/tags';
import { addVec, scaleVec } from '@/lib/numerics/vec3';
import { isWithin, type Bounds } from '@/lib/three-views/bounds';
import { type NamedPlace, type Picture } from '@/lib/three-views/picture';
import { onSheet, OPPOSITE, SHEET } from '@/lib/three-views/views';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type LengthUnit } from '@/lib/units/table';

/** Words keep a rim of paper, so that marks behind them do not strike them out. */
export const RIM = {
  paintOrder: 'stroke',
  stroke: 'var(--sheet)',
  strokeWidth: 4,
  strokeLinejoin: 'round',
} as const;

const ORIGIN: AirframeVec = [0, 0, 0];

/** What is drawn in pixels at a place, whatever the scale of the sheet. */
export function At({
  sheet,
  place,
  children,
}: {
  readonly sheet: Sheet;
  readonly place: AirframeVec;
  readonly children: ReactNode;
}) {
  const { x, y } = sheet.percent(place);
  return (
    <svg x={`${x}%`} y={`${y}%`} width="1" height="1" className="overflow-visible">
      {children}
    </svg>
  );
}

/** The trade's mark of a centre of gravity, quartered, on a cross that carries beyond the marks around it. */
export function CgMark({ sheet, cg }: { readonly sheet: Sheet; readonly cg: AirframeVec }) {
  return (
    <At sheet={sheet} place={cg}>
      <path d="M-22 0H22M0 -22V22" className="stroke-sheet" strokeWidth="5" />
      <path d="M-22 0H22M0 -22V22" className="stroke-spin" strokeWidth="2" />
      <circle r="8" className="fill-sheet stroke-spin" strokeWidth="2" />
      <path d="M0 0V-7A7 7 0 0 1 7 0ZM0 0V7A7 7 0 0 1 -7 0Z" className="fill-spin" />
      <text x="11" y="-11" style={RIM} className="fill-ink text-body font-semibold">
        CG
      </text>
    </At>
  );
}

/** The CG of a part alone, smaller and in ink. */
export function PartCgMark({ sheet, cg }: { readonly sheet: Sheet; readonly cg: AirframeVec }) {
  return (
    <At sheet={sheet} place={cg}>
      <path d="M-14 0H14M0 -14V14" className="stroke-sheet" strokeWidth="4" />
      <path d="M-14 0H14M0 -14V14" className="stroke-ink" strokeWidth="1.5" />
      <circle r="5.5" className="fill-sheet stroke-ink" strokeWidth="1.5" />
      <path d="M0 0V-5A5 5 0 0 1 5 0ZM0 0V5A5 5 0 0 1 -5 0Z" className="fill-ink" />
      <text x="9" y="18" style={RIM} className="fill-ink text-note font-semibold">
        CG of these
      </text>
    </At>
  );
}

/** Leading edge and end of the mean chord; nothing where no chord is known. */
export function chordEnds({ axes, lemac, mac }: Picture['geometry']): readonly AirframeVec[] {
  return mac > 0 ? [lemac, addVec(lemac, scaleVec(mac, arrow('aft', axes)))] : [];
}

/** The mean chord in the views that see its length. */
export function ChordBar({
  sheet,
  geometry,
}: {
  readonly sheet: Sheet;
  readonly geometry: Picture['geometry'];
}) {
  const [lemac, end] = chordEnds(geometry);
  if (lemac === undefined || end === undefined || sheet.view === 'front') return null;
  const [from, to] = [sheet.percent(lemac), sheet.percent(end)];
  const line = { x1: `${from.x}%`, x2: `${to.x}%`, y1: `${from.y}%`, y2: `${to.y}%` };
  return (
    <g>
      <line {...line} className="stroke-ink" strokeWidth="6" />
      <line {...line} className="stroke-sheet" strokeWidth="4" />
      <At sheet={sheet} place={lemac}>
        <line x1="0" x2="0" y1="-8" y2="8" className="stroke-ink" strokeWidth="2" />
        <text x="-5" y="4" textAnchor="end" style={RIM} className="fill-ink text-note">
          LEMAC
        </text>
      </At>
      <At sheet={sheet} place={end}>
        <line x1="0" x2="0" y1="-5" y2="5" className="stroke-ink" strokeWidth="2" />
        <text x="5" y="4" style={RIM} className="fill-ink text-note">
          MAC
        </text>
      </At>
    </g>
  );
}

/** The datum where the sheet reaches it. */
export function Datum({ sheet, bounds }: { readonly sheet: Sheet; readonly bounds: Bounds }) {
  if (!isWithin(ORIGIN, bounds)) return null;
  return (
    <At sheet={sheet} place={ORIGIN}>
      <path d="M-9 0H9M0 -9V9" className="stroke-ink" strokeWidth="1.5" />
      <path d="M-4 -4L4 4M-4 4L4 -4" className="stroke-ink" />
      <text x="8" y="-6" style={RIM} className="fill-ink text-note">
        Datum
      </text>
    </At>
  );
}

/** How far off the sheet the datum lies, in words with their directions; null where it is on it. */
export function datumWords(sheet: Sheet, bounds: Bounds, unit: LengthUnit): string | null {
  if (isWithin(ORIGIN, bounds)) return null;
  const { across, upward } = SHEET[sheet.view];
  const [u, v] = onSheet(bounds.map(([low, high]) => (low + high) / 2) as unknown as AirframeVec, sheet.axes);
  const parts = [
    { distance: -u, half: sheet.width / 2, toward: across },
    { distance: -v, half: sheet.height / 2, toward: upward },
  ].filter(({ distance, half }) => Math.abs(distance) > half);
  if (parts.length === 0) return null;
  const words = parts.map(({ distance, half, toward }) => {
    const off = fromSi(Math.abs(distance) - half, unit);
    return `${plainText(numberText(off, unit === 'in' ? 0 : 1))} ${unitLabel(unit)} farther ${distance > 0 ? toward : OPPOSITE[toward]}`;
  });
  return `Datum ${words.join(', ')}`;
}

/** An arrow at the edge of the sheet towards a datum beyond it. */
export function FarDatum({
  sheet,
  bounds,
  unit,
}: {
  readonly sheet: Sheet;
  readonly bounds: Bounds;
  readonly unit: LengthUnit;
}) {
  const words = datumWords(sheet, bounds, unit);
  if (words === null) return null;
  const { x, y } = sheet.percent(ORIGIN);
  const [left, top] = [Math.min(97, Math.max(3, x)), Math.min(94, Math.max(6, y))];
  const angle = (180 / Math.PI) * Math.atan2((y - top) * sheet.height, (x - left) * sheet.width);
  const anchor = left < 20 ? 'start' : left > 80 ? 'end' : 'middle';
  const dx = anchor === 'start' ? 14 : anchor === 'end' ? -14 : 0;
  return (
    <svg x={`${left}%`} y={`${top}%`} width="1" height="1" className="overflow-visible">
      <path
        d="M-8 0H8M3 -4L8 0L3 4"
        transform={`rotate(${angle})`}
        className="fill-none stroke-ink"
        strokeWidth="1.5"
      />
      <text
        x={dx}
        y={anchor === 'middle' ? (top > 50 ? -12 : 22) : 4}
        textAnchor={anchor}
        style={RIM}
        className="fill-ink text-note"
      >
        {words}
      </text>
    </svg>
  );
}

/** Named places of the frame issue; their names are put beside them with the other labels. */
export function PointMarks({
  sheet,
  points,
}: {
  readonly sheet: Sheet;
  readonly points: readonly NamedPlace[];
}) {
  return (
    <>
      {points.map(({ code, title, place }) => (
        <At key={code} sheet={sheet} place={place}>
          <path d="M0 -5L5 0L0 5L-5 0Z" className="fill-sheet stroke-ink" strokeWidth="1.5">
            <title>{title === null ? code : `${code}, ${title}`}</title>
          </path>
        </At>
      ))}
    </>
  );
}

/** Which side of the aircraft is where, where it is not plain from the picture; and the plane of symmetry. */
export function Sides({
  sheet,
  axes,
  lateralPlane,
}: {
  readonly sheet: Sheet;
  readonly axes: AxisTriple;
  readonly lateralPlane: number;
}) {
  const { across, upward } = SHEET[sheet.view];
  const note = 'fill-ink-2 text-note';
  if (sheet.view === 'side')
    return (
      <text x="8" y="18" style={RIM} className={note}>
        {OPPOSITE[across]}
      </text>
    );
  const onPlane = scaleVec(
    lateralPlane,
    sheet.view === 'plan' ? arrowOf(axes, upward) : arrowOf(axes, across),
  );
  const { x, y } = sheet.percent(onPlane);
  const plane =
    sheet.view === 'plan'
      ? { x1: '0', x2: '100%', y1: `${y}%`, y2: `${y}%` }
      : { x1: `${x}%`, x2: `${x}%`, y1: '0', y2: '100%' };
  return (
    <g>
      <line {...plane} className="stroke-ink-2" strokeDasharray="16 4 3 4" />
      <text x="8" y="18" style={RIM} className={note}>
        {sheet.view === 'plan' ? 'right side' : `${OPPOSITE[across]} side`}
      </text>
      {sheet.view === 'plan' ? (
        <svg x="0" y="100%" width="1" height="1" className="overflow-visible">
          <text x="8" y="-8" style={RIM} className={note}>
            left side
          </text>
        </svg>
      ) : (
        <svg x="100%" y="0" width="1" height="1" className="overflow-visible">
          <text x="-8" y="18" textAnchor="end" style={RIM} className={note}>
            {across} side
          </text>
        </svg>
      )}
    </g>
  );
}

/** The unit vector along the coordinate that runs in or against `direction`: positive along the coordinate. */
function arrowOf(
  axes: AxisTriple,
  direction: 'aft' | 'forward' | 'right' | 'left' | 'up' | 'down',
): AirframeVec {
  const along = arrow(direction, axes);
  return [Math.abs(along[0]), Math.abs(along[1]), Math.abs(along[2])];
}
