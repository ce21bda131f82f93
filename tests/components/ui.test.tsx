import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { StationRule } from '@/components/shell/station-rule';
import { themeCookie, themeFromCookie } from '@/components/shell/theme';
import { Banner } from '@/components/ui/banner';
import { Caution } from '@/components/ui/caution';
import { RadioGroup } from '@/components/ui/choice';
import { fileSize } from '@/components/ui/file-field';
import { ProgressBar } from '@/components/ui/progress-bar';
import { SelectField } from '@/components/ui/select-field';
import { NumberField, TextField } from '@/components/ui/text-field';

const attribute = (markup: string, name: string) => new RegExp(` ${name}="([^"]*)"`).exec(markup)?.[1];

describe('a field', () => {
  const markup = renderToStaticMarkup(
    <TextField name="title" label="Title" hint="As on the drawing." error="Give the list a title." />,
  );

  it('is labelled above and tied to its hint and its error', () => {
    const input = /<input[^>]*>/.exec(markup)?.[0] ?? '';
    const id = attribute(input, 'id') ?? '';
    expect(markup).toContain(`<label for="${id}"`);
    expect(attribute(input, 'aria-describedby')).toBe(`${id}-hint ${id}-error`);
    expect(attribute(input, 'aria-invalid')).toBe('true');
    expect(markup).toMatch(new RegExp(`id="${id}-error"[^>]*>.*Give the list a title\\.`));
  });

  it('without an error is not marked as wrong', () => {
    expect(renderToStaticMarkup(<TextField name="title" label="Title" error={[]} />)).not.toContain(
      'aria-invalid="',
    );
  });

  it('for a number names its unit to those who hear it', () => {
    const number = renderToStaticMarkup(<NumberField name="mass" label="Mass" unit="kg" />);
    const unit = /<span id="([^"]*-unit)"[^>]*>kg<\/span>/.exec(number)?.[1];
    expect(unit).toBeDefined();
    expect(attribute(/<input[^>]*>/.exec(number)?.[0] ?? '', 'aria-describedby')).toBe(unit);
    expect(number).toContain('inputMode="decimal"');
  });

  it('keeps a choice that the server sent back', () => {
    const select = renderToStaticMarkup(
      <SelectField
        name="unit"
        label="Unit"
        defaultValue="lb"
        options={[
          { value: 'kg', label: 'kg' },
          { value: 'lb', label: 'lb' },
        ]}
      />,
    );
    expect(select).toMatch(/<option value="lb" selected="">/);
    const radio = renderToStaticMarkup(
      <RadioGroup
        name="sign"
        label="Products"
        defaultValue="negative"
        options={[
          { value: 'positive', label: 'Positive' },
          { value: 'negative', label: 'Negative' },
        ]}
      />,
    );
    expect(radio.match(/checked=""/g)).toHaveLength(1);
    expect(radio).toMatch(/checked="" value="negative"|value="negative"[^>]*checked=""/);
  });
});

describe('a banner', () => {
  it('says its severity in a word, and an error of ours at once', () => {
    expect(renderToStaticMarkup(<Banner severity="warning">Row 18 is heavy.</Banner>)).toContain('Warning');
    const failed = renderToStaticMarkup(
      <Banner severity="blocker" word="Failed" live>
        The upload stopped.
      </Banner>,
    );
    expect(failed).toContain('role="alert"');
    expect(failed).toContain('Failed');
  });
});

describe('progress', () => {
  it('says how many are done, of how many, to eye and ear', () => {
    const markup = renderToStaticMarkup(
      <ProgressBar label="Checking rows" done={12400} total={100000} of="rows" />,
    );
    expect(attribute(markup, 'aria-valuenow')).toBe('12400');
    expect(attribute(markup, 'aria-valuemax')).toBe('100000');
    expect(markup).toContain('width="12.4%"');
    expect(markup).toContain('12 400 of 100 000 rows');
  });

  it('claims no share while the whole is not known', () => {
    const markup = renderToStaticMarkup(<ProgressBar label="Reading" done={5} total={null} of="rows" />);
    expect(markup).not.toContain('aria-valuenow');
  });
});

describe('the station rule', () => {
  const stations = ['lists', 'rotors', 'configurations', 'baselines'].map((code) => ({
    code,
    title: code,
    href: `/${code}`,
    waiting: code === 'lists' ? { count: 2, words: 'lists with problems' } : null,
  }));

  it('marks where you stand once, with a plumb line', () => {
    const markup = renderToStaticMarkup(<StationRule stations={stations} current="configurations" />);
    expect(markup.match(/aria-current="page"/g)).toHaveLength(1);
    expect(markup.match(/fill-spin/g)).toHaveLength(1);
    expect(markup).toContain('lists with problems');
  });

  it('keeps only the neighbours on a narrow screen', () => {
    const markup = renderToStaticMarkup(<StationRule stations={stations} current="configurations" />);
    expect(markup.match(/max-sm:hidden/g)).toHaveLength(1);
  });
});

describe('the caution', () => {
  it('says what results rest on and what they are not', () => {
    const markup = renderToStaticMarkup(<Caution />);
    for (const words of ['only as good as the lists', 'not an airworthiness approval', 'approved manual']) {
      expect(markup).toContain(words);
    }
  });
});

describe('the theme', () => {
  it('follows the system unless a cookie asks for another', () => {
    expect([undefined, 'dark', 'light', 'system', 'x"><script>'].map(themeFromCookie)).toEqual([
      'system',
      'dark',
      'light',
      'system',
      'system',
    ]);
  });

  it('is forgotten when the system is to be followed again', () => {
    expect(themeCookie('system', false)).toContain('Max-Age=0');
    expect(themeCookie('dark', true)).toBe(
      'polhode-theme=dark; Path=/; Max-Age=31536000; SameSite=Lax; Secure',
    );
  });
});

describe('the size of a file', () => {
  it('is said to three figures', () => {
    expect([12, 1500, 2_345_678, 104_857_600].map(fileSize)).toEqual([
      '12 bytes',
      '1.5 kB',
      '2.35 MB',
      '105 MB',
    ]);
  });
});
