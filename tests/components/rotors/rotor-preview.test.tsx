import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { RotorPreview } from '@/components/rotors/rotor-preview';
import { RotorTable } from '@/components/rotors/rotor-table';
import { type RotorTexts, rotorFromTexts } from '@/lib/ingest/one-rotor';
import { radiansPerSecond } from '@/lib/units/convert';

const geometry = { axes: ['aft', 'right', 'up'], incidence: 0 } as const;
const PROP = { rotor: 'Prop', polar_inertia: '4', axis_yaw: '0', axis_pitch: '0', sense: 'cw' };
const points = [
  {
    code: 'cruise',
    title: 'Cruise',
    speeds: [{ shaft: 'Prop', speed: radiansPerSecond(1500), sigma: null }],
  },
];

function preview(texts: RotorTexts): string {
  const { rotor } = rotorFromTexts(texts, 'kg.m2');
  return renderToStaticMarkup(<RotorPreview {...{ rotor, texts, points, geometry }} />);
}

describe('the preview of a rotor', () => {
  it('shows the arrow, the sense in words and h = I times speed along it', () => {
    const markup = preview(PROP);
    expect(markup).toContain('Clockwise seen from behind');
    // 4 kg.m2 at 1500 rpm, clockwise from behind is +x forward by the right-hand rule: h = 4 * 1500 * 2 pi / 60.
    expect(markup).toContain(`value="${4 * radiansPerSecond(1500)}"`);
    expect(preview({ ...PROP, sense: 'ccw' })).toContain(`value="${-4 * radiansPerSecond(1500)}"`);
  });

  it('shows the arrow before the rest is typed, and says what is missing', () => {
    const markup = preview({ ...PROP, polar_inertia: '' });
    expect(markup).toContain('Clockwise seen from behind');
    expect(markup).toContain('once every field can be read');
    expect(preview({ rotor: 'Prop', polar_inertia: '4' })).toContain('Give the axis and the sense');
    expect(preview({ ...PROP, shaft: 'N3' })).toContain('No operating point gives the shaft N3 a speed');
  });
});

describe('the table of rotors', () => {
  it('leads to the form of each where it can be changed, and nowhere else', () => {
    const { rotor } = rotorFromTexts({ ...PROP, rotor: 'Prop L', note: 'wooden' }, 'kg.m2');
    if (rotor === null) throw new Error('no rotor');
    const table = (editHref: string | null) =>
      renderToStaticMarkup(
        <RotorTable rotors={[rotor]} geometry={geometry} unit="kg.m2" program="p" editHref={editHref} />,
      );
    expect(table('/rotor')).toContain('href="/rotor?rotor=Prop%20L"');
    expect(table(null)).not.toContain('href');
    expect(table(null)).toContain('wooden');
  });
});
