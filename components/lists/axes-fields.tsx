'use client';

import { useState } from 'react';
import { SelectField } from '@/components/ui/select-field';
import { axesProblem, type AxisTriple, DIRECTIONS, handedness } from '@/lib/frames/axes';

interface AxesFieldsProps {
  readonly values: Readonly<Record<string, string>>;
  readonly error: readonly string[] | undefined;
}

const NAMES = ['axis_x', 'axis_y', 'axis_z'] as const;

/** Where +x, +y and +z of a list point, with a check in words at once. */
export function AxesFields({ values, error }: AxesFieldsProps) {
  const [axes, setAxes] = useState(NAMES.map((name) => values[name] ?? ''));
  return (
    <fieldset className="grid gap-2">
      <legend className="mb-1 font-semibold">Axes of the list</legend>
      <div className="grid grid-cols-3 gap-4">
        {NAMES.map((name, index) => (
          <SelectField
            key={name}
            name={name}
            label={`+${name.slice(-1)} points`}
            defaultValue={values[name] ?? ''}
            onChange={(event) => setAxes(axes.map((word, at) => (at === index ? event.target.value : word)))}
            placeholder="Choose"
            options={DIRECTIONS.map((word) => ({ value: word, label: word }))}
            {...(index === 0 ? { error } : {})}
          />
        ))}
      </div>
      <p role="status" className="measure text-note text-ink-2">
        {axesWordsOf(axes)}
      </p>
    </fieldset>
  );
}

function axesWordsOf(words: readonly string[]): string {
  if (words.some((word) => word === ''))
    return 'Each axis takes one line of the aircraft: its length, its width or its height.';
  const problem = axesProblem(words);
  if (problem !== null) return problem;
  return handedness(words as unknown as AxisTriple) === 1
    ? 'These axes are right-handed.'
    : 'These axes are left-handed. That is allowed, and converted; make sure the source means it.';
}
