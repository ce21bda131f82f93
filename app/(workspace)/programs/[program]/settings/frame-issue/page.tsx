import { type Metadata } from 'next';
import { currentFrameIssue, type FrameIssue, geometryOf } from '@/db/queries/frames';
import { type FormerFrame } from '@/components/settings/former-fields';
import { FrameForm } from '@/components/settings/frame-form';
import { ChoiceLinks } from '@/components/ui/choice-links';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { USUAL_AXES } from '@/lib/frames/axes';
import { quarterChord } from '@/lib/frames/chord';
import { serverDb } from '@/lib/server/database';
import { requireProgram } from '@/lib/server/http/page';
import { askedLength } from '@/lib/units/choice';
import { asTyped, degreesAsTyped } from '@/lib/units/convert';
import { LENGTH_UNITS, type LengthUnit } from '@/lib/units/table';
import { ProgramFrame } from '../../frame';
import { issueFrameAction } from '../actions';

export const metadata: Metadata = { title: 'Issue the airframe frame' };

/** The form that issues a frame, filled with what the newest issue says. */
export default async function FrameIssuePage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/settings/frame-issue'>) {
  const access = await requireProgram((await params).program, 'frame.keep');
  const { program } = access;
  const unit = askedLength((await searchParams)['length']);
  const home = `/programs/${program.code}/settings`;
  const newest = await currentFrameIssue(serverDb(), program.id);
  const base = newest?.number ?? 0;
  return (
    <ProgramFrame access={access}>
      <PageHead
        title={`Issue frame ${base + 1}`}
        above={<TextLink href={home}>Airframe frame</TextLink>}
        lead={
          base === 0
            ? 'What every list and result of this program refers to.'
            : `Issue ${base} stays as it is, with the lists and configurations that refer to it. New ones refer to issue ${base + 1}, and what stays behind is converted where it is needed.`
        }
      />
      <ChoiceLinks
        label="Lengths in"
        options={LENGTH_UNITS.map((each) => ({
          words: each,
          href: `${home}/frame-issue?length=${each}`,
          current: each === unit,
        }))}
      />
      <FrameForm
        key={unit}
        action={issueFrameAction}
        program={program.code}
        base={base}
        unit={unit}
        axes={newest ? geometryOf(newest).axes : USUAL_AXES}
        former={newest ? formerFrame(newest) : null}
        present={newest ? presentValues(newest, unit) : { lemac_y: '0', lateral_plane: '0', incidence: '0' }}
      />
    </ProgramFrame>
  );
}

/** With its LEMAC as the example, because that has to be stated anew. */
function formerFrame(issue: FrameIssue): FormerFrame {
  const geometry = geometryOf(issue);
  return { number: issue.number, geometry, example: { item: 'LEMAC', place: geometry.lemac } };
}

function presentValues(issue: FrameIssue, unit: LengthUnit): Record<string, string> {
  const { axes, lemac, reference, mac, span, length, lateralPlane, incidence } = geometryOf(issue);
  const shown = (value: number): string => String(asTyped(value, unit));
  // Left blank it is the quarter chord, which a moved chord takes with it.
  const quarter = quarterChord(lemac, mac, axes);
  const isQuarter = quarter.every((part, k) => Math.abs(part - (reference[k] ?? NaN)) < 1e-9);
  const places = {
    reference_x: shown(reference[0]),
    reference_y: shown(reference[1]),
    reference_z: shown(reference[2]),
  };
  return {
    lemac_x: shown(lemac[0]),
    lemac_y: shown(lemac[1]),
    lemac_z: shown(lemac[2]),
    mac: shown(mac),
    span: shown(span),
    length: shown(length),
    lateral_plane: shown(lateralPlane),
    incidence: String(degreesAsTyped(incidence)),
    ...(isQuarter ? {} : places),
  };
}
