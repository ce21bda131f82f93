import { DefinitionList } from '@/components/ui/definition-list';
import { type HandoffDocument } from '@/lib/baselines/handoff-document';
import { OUTPUT_UNITS, unitLabel } from '@/lib/units/names';

type Conventions = HandoffDocument['conventions'];

/** Frames, spin and units of a hand-off document, in words. */
export function ConventionFacts({ conventions }: { readonly conventions: Conventions }) {
  const { airframeAxes, airframeToBody, frameIssue, incidenceDeg } = conventions;
  const { x, y, z } = airframeAxes;
  const incidence =
    incidenceDeg === 0
      ? 'x lies along the reference line.'
      : `x is ${Math.abs(incidenceDeg)} deg nose-${incidenceDeg > 0 ? 'up' : 'down'} from the reference line.`;
  return (
    <DefinitionList
      items={[
        {
          term: 'Inertia, momentum',
          value: `Body axes from the CG: x forward, y right, z down. ${incidence}`,
        },
        {
          term: 'CG, places',
          value: `Airframe axes from the datum: x ${x}, y ${y}, z ${z}. Frame issue ${frameIssue}.`,
        },
        {
          term: 'Airframe to body',
          value: (
            <>
              v<sub>body</sub> = A v<sub>airframe</sub>, rows of A:{' '}
              <code>{airframeToBody.map((row) => `[${row.join(', ')}]`).join(' ')}</code>
            </>
          ),
        },
        {
          term: 'Spin',
          value:
            'Right-hand rule: p rolls the right wing down, q pitches the nose up, r yaws the nose right. A propeller that turns ' +
            'clockwise seen from behind has a positive hx.',
        },
        { term: 'Units', value: <UnitWords system="si" /> },
        {
          term: 'With ?units=us',
          value: <UnitWords system="us" />,
        },
      ]}
    />
  );
}

function UnitWords({ system }: { readonly system: 'si' | 'us' }) {
  const { mass, length, inertia, angularMomentum } = OUTPUT_UNITS[system];
  return [mass, length, inertia, angularMomentum].map(unitLabel).join(', ');
}
