import { BalanceBar } from '@/components/mass/balance-bar';
import { CgTable } from '@/components/mass/cg-table';
import { MassFigure } from '@/components/mass/mass-figure';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { tensorDeviation } from '@/components/mass/tensor-deviation';
import { TwoTensors } from '@/components/mass/two-tensors';
import { MassMargin } from '@/components/configurations/mass-margin';
import { Banner } from '@/components/ui/banner';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type MassProperties } from '@/lib/mass/result';
import { type RollUp } from '@/lib/mass/roll-up';
import { radiiSigma } from '@/lib/mass/uncertainty/derived';
import { type MassUncertainty, type PropertiesUncertainty } from '@/lib/mass/uncertainty/uncertainty-of';
import { type Vec3 } from '@/lib/numerics/vec3';
import { fromSi } from '@/lib/units/convert';
import { type OutputUnits } from '@/lib/units/names';

export interface ProgramLimits {
  /** % MAC. */
  readonly forward: number | null;
  readonly aft: number | null;
  /** kg. */
  readonly mass: { readonly value: number; readonly kind: string; readonly source: string } | null;
}

interface ConditionResultProps {
  readonly rollUp: RollUp;
  readonly uncertainty: { readonly basic: MassUncertainty; readonly predicted: MassUncertainty };
  readonly geometry: AirframeGeometry;
  readonly limits: ProgramLimits;
  readonly units: OutputUnits;
}

/** Mass, balance and inertia of one condition. */
export function ConditionResultView({ rollUp, uncertainty, geometry, limits, units }: ConditionResultProps) {
  const { basic, predicted } = rollUp;
  const { properties } = basic;
  // Where no row states a σ there is nothing to show: zero would read as certain.
  const stated = (uncertainty.basic.massShare ?? 0) > 0;
  const sigma = stated ? uncertainty.basic.properties : null;
  const predictedSigma = stated ? uncertainty.predicted.properties : null;
  return (
    <div className="grid min-w-0 gap-8">
      <div className="grid items-start gap-8 md:grid-cols-[minmax(240px,1fr)_2fr]">
        <MassFigure
          label="Basic mass"
          mass={basic.mass}
          predicted={predicted.mass}
          unit={units.mass}
          {...(stated ? { sigma: uncertainty.basic.mass, predictedSigma: uncertainty.predicted.mass } : {})}
        >
          {limits.mass === null ? null : (
            <MassMargin basic={basic.mass} predicted={predicted.mass} limit={limits.mass} unit={units.mass} />
          )}
        </MassFigure>
        {properties === null || properties.percentMac === null ? null : (
          <BalanceBar
            cg={properties.percentMac}
            forwardLimit={limits.forward}
            aftLimit={limits.aft}
            {...(typeof sigma?.percentMac === 'number' ? { sigma: sigma.percentMac } : {})}
          />
        )}
      </div>
      {properties === null ? (
        <Banner severity="blocker" title="There is no CG and no tensor.">
          <p>A condition whose mass is zero or less has none. Check what is on board.</p>
        </Banner>
      ) : (
        <>
          <CgTable
            basic={properties}
            predicted={predicted.properties}
            sigma={balanceDeviation(sigma)}
            predictedSigma={balanceDeviation(predictedSigma)}
            axes={geometry.axes}
            units={units}
          />
          <TwoTensors
            basic={properties}
            predicted={predicted.properties}
            sigma={{
              basic: tensorDeviation(properties, sigma),
              predicted: tensorDeviation(predicted.properties, predictedSigma),
            }}
            unit={units.inertia}
          />
          <SigmaNote share={uncertainty.basic.massShare} />
          <RadiiTable
            basic={properties}
            predicted={predicted.properties}
            sigma={sigma === null ? null : radiiSigma(basic.mass, properties.inertia, sigma.covariance)}
            units={units}
          />
        </>
      )}
    </div>
  );
}

function balanceDeviation(sigma: PropertiesUncertainty | null) {
  if (sigma === null) return null;
  return { cg: [sigma.cg.x, sigma.cg.y, sigma.cg.z] as const, percentMac: sigma.percentMac };
}

interface TwoResults {
  readonly basic: MassProperties;
  readonly predicted: MassProperties | null;
  /** One standard deviation of the basic radii, m. */
  readonly sigma: Vec3 | null;
  readonly units: OutputUnits;
}

/** What the ± beside the figures is, and how much of the aircraft it knows. */
function SigmaNote({ share }: { readonly share: number | null }) {
  const percent = 100 * (share ?? 0);
  return (
    <p className="text-note text-ink-2">
      {percent > 0 ? (
        <>
          ± is one standard deviation, to first order.{' '}
          <Num value={percent} decimals={percent > 99.9 || percent < 1 ? 2 : 0} /> % of the mass states one;
          the rest counts as certain.
        </>
      ) : (
        'No row states an uncertainty, so none is shown.'
      )}
    </p>
  );
}

function RadiiTable({ basic, predicted, sigma, units }: TwoResults) {
  const rows = [
    { name: 'Basic', radii: basic.radii },
    { name: 'Predicted', radii: predicted?.radii ?? null },
  ].flatMap(({ name, radii }) => (radii === null ? [] : [{ name, radii }]));
  if (rows.length === 0) return null;
  const lengths = (values: readonly number[]): number[] => values.map((value) => fromSi(value, units.length));
  const decimals = sharedDecimals(
    rows.flatMap(({ radii }) => lengths([radii.x, radii.y, radii.z])),
    lengths(sigma ?? []),
    5,
  );
  const deviation =
    sigma === null
      ? []
      : [{ name: '± of the basic radii', radii: { x: sigma[0], y: sigma[1], z: sigma[2] } }];
  return (
    <Table caption="Radii of gyration about the body axes through the CG">
      <thead>
        <tr>
          <ColumnHead>Radius of gyration</ColumnHead>
          {['x', 'y', 'z'].map((letter) => (
            <ColumnHead key={letter} side="right" unit={units.length}>
              k<sub className="text-[0.83em]">{letter}</sub>
            </ColumnHead>
          ))}
        </tr>
      </thead>
      <tbody>
        {[...rows, ...deviation].map(({ name, radii }) => (
          <tr key={name}>
            <RowHead>{name}</RowHead>
            {[radii.x, radii.y, radii.z].map((value, index) => (
              <Cell key={index} side="right">
                <Num value={value} unit={units.length} decimals={decimals} />
              </Cell>
            ))}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
