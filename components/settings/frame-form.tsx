'use client';

import { useActionState, useState } from 'react';
import { textsIn } from '@/components/forms/texts-in';
import { FormAnswer } from '@/components/forms/form-answer';
import { AxesSketch } from '@/components/settings/axes-sketch';
import { FormerFields, type FormerFrame } from '@/components/settings/former-fields';
import { Actions } from '@/components/ui/actions';
import { Checkbox } from '@/components/ui/choice';
import { FieldRow, FormGrid } from '@/components/ui/form-grid';
import { SelectField } from '@/components/ui/select-field';
import { SubmitButton } from '@/components/ui/submit-button';
import { TextArea } from '@/components/ui/text-area';
import { NumberField, TextField } from '@/components/ui/text-field';
import { type FormAction, IDLE } from '@/lib/form-state';
import { axesProblem, type AxisTriple, type Direction, DIRECTIONS, USUAL_AXES } from '@/lib/frames/axes';
import { type LengthUnit } from '@/lib/units/table';

export interface FrameFormProps {
  readonly action: FormAction;
  readonly program: string;
  /** Number of the newest issue, 0 before the first. */
  readonly base: number;
  readonly unit: LengthUnit;
  readonly axes: AxisTriple;
  /** Field name -> text, from the newest issue. */
  readonly present: Readonly<Record<string, string>>;
  /** The issue before; null for the first. */
  readonly former: FormerFrame | null;
}

const OPTIONS = DIRECTIONS.map((direction) => ({ value: direction, label: direction }));
const isDirection = (text: string): text is Direction => DIRECTIONS.some((direction) => direction === text);

/** Issues the airframe frame: axes, mean chord, extent, and the point about which sums are kept. */
export function FrameForm({ action, program, base, unit, axes: first, present, former }: FrameFormProps) {
  const [state, send] = useActionState(action, IDLE);
  const [axes, setAxes] = useState<AxisTriple>(base === 0 ? USUAL_AXES : first);
  const [texts, setTexts] = useState<Readonly<Record<string, string>>>(present);
  const problem = axesProblem(axes);
  const field = (name: string) => ({
    name,
    defaultValue: state.values[name] ?? present[name] ?? '',
    error: state.errors[name],
  });
  const length = (name: string, label: string) => (
    <NumberField {...field(name)} label={label} unit={unit} required />
  );
  const turn = (index: number, word: string) => {
    if (!isDirection(word)) return;
    const [x, y, z] = axes.map((old, at) => (at === index ? word : old));
    if (x && y && z) setAxes([x, y, z]);
  };
  return (
    <form action={send} onChange={(event) => setTexts(textsIn(event.currentTarget))}>
      <FormGrid>
        <FormAnswer state={state} />
        <input type="hidden" name="program" value={program} />
        <input type="hidden" name="base" value={base} />
        <input type="hidden" name="length_unit" value={unit} />
        <TextField
          {...field('title')}
          label="Title"
          hint="Of the document that defines it, for example."
          required
        />
        <FieldRow>
          {(['x', 'y', 'z'] as const).map((letter, index) => (
            <SelectField
              key={letter}
              name={`axis_${letter}`}
              label={`+${letter} points`}
              options={OPTIONS}
              value={axes[index]}
              onChange={(event) => turn(index, event.target.value)}
              error={letter === 'x' ? (problem ?? state.errors['axis_x']) : null}
            />
          ))}
        </FieldRow>
        {problem === null ? <AxesSketch axes={axes} /> : null}
        {former === null ? null : (
          <FormerFields {...{ former, unit, field, texts }} axes={problem === null ? axes : null} />
        )}
        <fieldset className="grid gap-4">
          <legend className="mb-1 text-lead font-semibold">Mean aerodynamic chord and extent</legend>
          <FieldRow>
            {length('lemac_x', 'LEMAC x')}
            {length('lemac_y', 'LEMAC y')}
            {length('lemac_z', 'LEMAC z')}
          </FieldRow>
          <FieldRow>
            {length('mac', 'MAC')}
            {length('span', 'Span')}
            {length('length', 'Length')}
          </FieldRow>
          <FieldRow>
            <NumberField
              {...field('lateral_plane')}
              label="Plane of symmetry at"
              unit={unit}
              hint="Its lateral coordinate, usually 0."
              required
            />
            <NumberField
              {...field('incidence')}
              label="Incidence of body x"
              unit="deg"
              hint="Nose-up from the reference line."
              required
            />
          </FieldRow>
        </fieldset>
        <fieldset className="grid gap-4">
          <legend className="mb-1 text-lead font-semibold">Point about which sums are kept</legend>
          <p className="measure -mt-1 text-ink-2">
            Near the aircraft, so that a far datum costs no digits. Left blank it is the quarter point of the
            mean chord.
          </p>
          <FieldRow>
            {(['x', 'y', 'z'] as const).map((letter) => (
              <NumberField
                key={letter}
                {...field(`reference_${letter}`)}
                label={letter}
                unit={unit}
                placeholder="quarter chord"
                optional
              />
            ))}
          </FieldRow>
        </fieldset>
        <TextField {...field('valid_from')} type="date" label="Valid from" required />
        {base > 0 ? (
          <Checkbox
            name="carry_points"
            defaultChecked={state.status === 'failed' ? state.values['carry_points'] === 'on' : true}
            label={`Take the reference points of issue ${base} over`}
            hint="The same points of the aircraft: their places are converted."
          />
        ) : null}
        <TextArea
          {...field('reason')}
          label="Reason"
          hint="What changed, and by whose decision."
          rows={3}
          required
        />
        <Actions>
          <SubmitButton pendingWords={`Issuing frame ${base + 1}`}>{`Issue frame ${base + 1}`}</SubmitButton>
        </Actions>
      </FormGrid>
    </form>
  );
}
