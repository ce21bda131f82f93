'use client';

import { type CSSProperties, type ReactNode, useCallback, useEffect, useMemo, useState } from 'react';
import { OneView } from '@/components/three-views/one-view';
import { PieceFacts } from '@/components/three-views/piece-facts';
import { PieceTable } from '@/components/three-views/piece-table';
import { GroupsKey, MassScale } from '@/components/three-views/picture-key';
import { RegionForm } from '@/components/three-views/region-form';
import { RegionSums } from '@/components/three-views/region-sums';
import { sheetOf } from '@/components/three-views/sheet';
import { useRegion } from '@/components/three-views/use-region';
import { Section } from '@/components/ui/section';
import { isWithin } from '@/lib/three-views/bounds';
import { type Picture, piecesOf, type Piece } from '@/lib/three-views/picture';
import { EVERYWHERE, holds, isEverywhere, type Region } from '@/lib/three-views/region';
import { sumsOf } from '@/lib/three-views/sums';
import { OUTPUT_UNITS, type UnitSystem } from '@/lib/units/names';

interface ThreeViewsProps {
  readonly picture: Picture;
  readonly system: UnitSystem;
  readonly showPoints: boolean;
  /** The top group that alone is shown. */
  readonly group: string | null;
  /** By top group, the address that shows it alone; under '' the one that shows all. */
  readonly groupHrefs: Readonly<Record<string, string>>;
  readonly listsHref: string;
  readonly exportName: string;
  /** Whether a filter leaves some of the condition out. */
  readonly filtered: boolean;
  /** Beside the views. */
  readonly notes: ReactNode;
}

/** Pixels of the two plots side by side on a desk screen: what labels are placed for. */
const DESK = 1270;
const TABLE_ID = 'components';

/** Side, plan and front with what is brushed in them beneath: one region, marked in all three. */
export function ThreeViews(props: ThreeViewsProps) {
  const { picture, system, showPoints, group, groupHrefs, listsHref, exportName } = props;
  const { bounds, geometry, rows, groups, radiusOfOne } = picture;
  const units = OUTPUT_UNITS[system];
  const [region, setRegion] = useRegion();
  const [draft, setDraft] = useState<Region | null>(null);
  const [passed, setPassed] = useState<Piece | null>(null);
  const shownRegion = draft ?? region;
  const { side, plan, front } = useMemo(
    () => ({
      side: sheetOf('side', geometry.axes, bounds),
      plan: sheetOf('plan', geometry.axes, bounds),
      front: sheetOf('front', geometry.axes, bounds),
    }),
    [geometry.axes, bounds],
  );
  const keys = useMemo(() => new Map(groups.map((key) => [key.group, key])), [groups]);
  const all = useMemo(() => piecesOf(rows), [rows]);
  const drawn = useMemo(() => all.filter(({ place }) => isWithin(place, bounds)), [all, bounds]);
  const within = useMemo(
    () => (isEverywhere(shownRegion) ? all : all.filter(({ place }) => holds(shownRegion, place))),
    [all, shownRegion],
  );
  const brushed = useMemo(
    () => (isEverywhere(shownRegion) ? drawn : drawn.filter(({ place }) => holds(shownRegion, place))),
    [drawn, shownRegion],
  );
  const listed = useMemo(
    () => (isEverywhere(region) ? all : all.filter(({ place }) => holds(region, place))),
    [all, region],
  );
  const part = props.filtered || !isEverywhere(shownRegion);
  const partCg = useMemo(
    () => (part ? sumsOf(within, geometry.reference).cg : null),
    [part, within, geometry.reference],
  );
  const onRegion = useCallback((next: Region | null) => setRegion(next ?? EVERYWHERE), [setRegion]);
  useTableKey(TABLE_ID);
  const view = {
    picture,
    keys,
    pieces: drawn,
    brushed,
    region: shownRegion,
    passed,
    partCg: partCg !== null && isWithin(partCg, bounds) ? partCg : null,
    unit: units.length,
    showPoints,
    scale: DESK / (side.width + front.width),
    widest: Math.max(side.width, front.width),
    onDraft: setDraft,
    onRegion,
    onPass: setPassed,
  };
  const heaviest = all.reduce((most, { mass }) => Math.max(most, Math.abs(mass)), 0);
  return (
    <>
      <GroupsKey groups={groups} chosen={group} hrefOf={(one) => groupHrefs[one ?? ''] ?? ''} />
      <div
        className="three-views"
        style={{ '--length': `${side.width}fr`, '--span': `${front.width}fr` } as CSSProperties}
      >
        <OneView title="Side" sheet={side} {...view} />
        <OneView title="Front" sheet={front} {...view} />
        <OneView title="Plan" sheet={plan} {...view}>
          <MassScale radiusOfOne={radiusOfOne} heaviest={heaviest} width={plan.width} unit={units.mass} />
        </OneView>
        <div className="beside-views grid content-start gap-6">
          <PieceFacts picture={picture} piece={passed} units={units} />
          <RegionForm axes={geometry.axes} unit={units.length} region={region} onRegion={setRegion} />
          {props.notes}
        </div>
      </div>
      <Section title={isEverywhere(shownRegion) ? 'Everything in the views' : 'In the region'}>
        <RegionSums picture={picture} pieces={within} everything={all.length} units={units} />
        <div id={TABLE_ID} className="min-w-0">
          <PieceTable {...{ picture, units, listsHref, exportName }} pieces={listed} />
        </div>
      </Section>
    </>
  );
}

/** The table is one key away: T goes to it. */
function useTableKey(id: string): void {
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (event.key.toLowerCase() !== 't' || event.ctrlKey || event.metaKey || event.altKey) return;
      const { target } = event;
      if (target instanceof HTMLElement && target.closest('input, select, textarea, [role="dialog"]')) return;
      const table = document.getElementById(id)?.querySelector<HTMLElement>('[role="grid"]');
      if (!table) return;
      event.preventDefault();
      table.scrollIntoView({ block: 'nearest' });
      table.focus();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [id]);
}
