'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useActionState, useState } from 'react';
import { FormAnswer } from '@/components/forms/form-answer';
import { RotorPreview } from '@/components/rotors/rotor-preview';
import { Actions } from '@/components/ui/actions';
import { Button } from '@/components/ui/button';
import { RadioGroup } from '@/components/ui/choice';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextArea } from '@/components/ui/text-area';
import { NumberField, TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';
import { type RotorTexts, rotorFromTexts } from '@/lib/ingest/one-rotor';
import { type RotorColumn } from '@/lib/ingest/rotor-row';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type OperatingPoint } from '@/lib/rotors/rotor';
import { unitLabel } from '@/lib/units/names';
import { INERTIA_UNITS, type InertiaUnit } from '@/lib/units/table';

interface RotorFormProps {
  readonly action: FormAction;
  readonly program: string;
  /** The newest revision, which the change is laid over; 0 before the first. */
  readonly base: number;
  /** The rotor that is changed; null for a new one. */
  readonly was: string | null;
  /** As it stands, in `unit`. */
  readonly texts: RotorTexts;
  readonly unit: InertiaUnit;
  /** Names of the other rotors, and all shafts there are. */
  readonly others: readonly string[];
  readonly shafts: readonly string[];
  readonly points: readonly OperatingPoint[];
  readonly geometry: Pick<AirframeGeometry, 'axes' | 'incidence'>;
  readonly backHref: string;
}

type AxisKind = 'arrow' | 'angles';

const NOT_SENT: Readonly<Record<AxisKind, readonly RotorColumn[]>> = {
  arrow: ['axis_yaw', 'axis_pitch'],
  angles: ['axis_x', 'axis_y', 'axis_z'],
};

const SENSES: Readonly<Record<AxisKind, { readonly value: string; readonly label: string }[]>> = {
  arrow: [
    { value: 'rh', label: 'Right hand about the arrow (rh)' },
    { value: 'lh', label: 'Left hand about the arrow (lh)' },
  ],
  angles: [
    { value: 'cw', label: 'Clockwise seen from behind, looking forward (cw)' },
    { value: 'ccw', label: 'Counter-clockwise seen from behind, looking forward (ccw)' },
  ],
};

/** One rotor in all the columns of its file, with what it means beside it as it is typed. Saving makes a revision. */
export function RotorForm(props: RotorFormProps) {
  const { was, base, others, geometry } = props;
  const router = useRouter();
  const [state, send] = useActionState(props.action, IDLE);
  const [texts, setTexts] = useState<RotorTexts>(props.texts);
  const [unit, setUnit] = useState<InertiaUnit>(props.unit);
  const [kind, setKind] = useState<AxisKind>('axis_x' in props.texts ? 'arrow' : 'angles');
  const [touched, setTouched] = useState<readonly string[]>([]);
  const sent = Object.fromEntries(
    Object.entries(texts).filter(([column]) => !NOT_SENT[kind].some((one) => one === column)),
  ) as RotorTexts;
  const { rotor, problems } = rotorFromTexts(sent, unit);
  const isTaken = others.includes((texts.rotor ?? '').trim());

  /** What is wrong with a field, once it has been left or the form was sent. */
  const wrong = (column: RotorColumn): readonly string[] => {
    if (!touched.includes(column)) return state.errors[column] ?? [];
    const live = problems.filter((problem) => problem.column === column).map(({ message }) => message);
    return column === 'rotor' && isTaken
      ? [...live, `There is a rotor called ${texts.rotor ?? ''} already. Give this one another name.`]
      : live;
  };
  const type = (column: RotorColumn, text: string) => setTexts({ ...texts, [column]: text });
  const field = (column: RotorColumn) => ({
    name: column,
    value: texts[column] ?? '',
    error: wrong(column),
    onChange: (event: { readonly target: { readonly value: string } }) => type(column, event.target.value),
    onBlur: () => setTouched([...touched, column]),
  });
  const isOld = state.status === 'failed' && Object.keys(state.errors).length === 0;
  const [x, y, z] = geometry.axes;
  return (
    <div className="grid items-start gap-8 lg:grid-cols-[minmax(0,640px)_minmax(288px,1fr)]">
      <form action={send} noValidate>
        <FormGrid>
          <FormAnswer state={state} />
          {isOld ? (
            <div>
              <Button onClick={() => router.refresh()}>Put my change on the newest revision</Button>
            </div>
          ) : null}
          <input type="hidden" name="program" value={props.program} />
          <input type="hidden" name="base" value={base} />
          <input type="hidden" name="was" value={was ?? ''} />
          <TextField {...field('rotor')} label="Rotor" hint="A name that no other rotor has." required />
          <FieldRow>
            <NumberField
              {...field('polar_inertia')}
              label="Polar inertia about the spin axis"
              unit={unitLabel(unit)}
              required
            />
            <NumberField
              {...field('polar_inertia_sigma')}
              label="Its standard deviation"
              unit={unitLabel(unit)}
              optional
            />
          </FieldRow>
          <SelectField
            name="inertia_unit"
            label="Unit of both"
            hint="The figures are read in this unit; another unit does not change the figures."
            value={unit}
            onChange={(event) => setUnit(INERTIA_UNITS.find((one) => one === event.target.value) ?? unit)}
            options={INERTIA_UNITS.map((one) => ({ value: one, label: unitLabel(one) }))}
          />
          <RadioGroup
            name="axis_kind"
            label="The axis is given as"
            value={kind}
            onChange={(next) => {
              setKind(next === 'arrow' ? 'arrow' : 'angles');
              setTexts({ ...texts, sense: '' });
            }}
            inline
            options={[
              { value: 'angles', label: 'angles from straight forward' },
              { value: 'arrow', label: 'an arrow along the shaft' },
            ]}
          />
          {kind === 'arrow' ? (
            <FieldRow>
              <NumberField {...field('axis_x')} label={`x ${x}`} required />
              <NumberField {...field('axis_y')} label={`y ${y}`} required />
              <NumberField {...field('axis_z')} label={`z ${z}`} required />
            </FieldRow>
          ) : (
            <FieldRow>
              <NumberField
                {...field('axis_yaw')}
                label="Yaw"
                hint="Positive right, under 90."
                unit="deg"
                required
              />
              <NumberField
                {...field('axis_pitch')}
                label="Pitch"
                hint="Positive up, under 60."
                unit="deg"
                required
              />
            </FieldRow>
          )}
          <SelectField
            {...field('sense')}
            key={kind}
            label={kind === 'arrow' ? 'Hand of a positive speed' : 'Sense of a positive speed'}
            placeholder="Choose one"
            options={SENSES[kind]}
            required
          />
          <FieldRow>
            <TextField
              {...field('shaft')}
              label="Shaft"
              hint="Operating points give speeds per shaft. Blank: the rotor's own name."
              list="shafts"
              optional
            />
            <NumberField
              {...field('gear_ratio')}
              label="Gear ratio"
              hint="Rotor speed over shaft speed, above 0. Blank: 1."
              optional
            />
          </FieldRow>
          <datalist id="shafts">
            {props.shafts.map((shaft) => (
              <option key={shaft} value={shaft} />
            ))}
          </datalist>
          <FieldRow>
            <TextField
              {...field('component')}
              label="Row that carries its mass"
              hint="As list/item, as in engines/PROP-L."
              optional
            />
            <NumberField
              {...field('blades')}
              label="Blades"
              hint="Two raise a note on axial symmetry."
              optional
            />
          </FieldRow>
          <TextField {...field('group')} label="Group" optional />
          <TextArea {...field('note')} label="Note" rows={2} optional />
          <TextField
            name="reason"
            label="Reason for this revision"
            defaultValue={state.values['reason']}
            error={state.errors['reason']}
            maxLength={1000}
            required
          />
          <Actions>
            <SubmitButton
              pendingWords={`Saving revision ${base + 1}`}
            >{`Save revision ${base + 1}`}</SubmitButton>
            <Link href={props.backHref} className="underline decoration-1 underline-offset-4">
              Leave without saving
            </Link>
          </Actions>
        </FormGrid>
      </form>
      <RotorPreview rotor={rotor} texts={sent} points={props.points} geometry={geometry} />
    </div>
  );
}
