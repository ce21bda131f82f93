import { describe, expect, it } from 'vitest';
import { linkTo, renderMail } from '@/lib/server/email/render';

const APP = 'https://polhode.example';

describe('a message', () => {
  const { text, html } = renderMail(
    [
      { kind: 'heading', text: 'Baseline <4> & "more"' },
      { kind: 'paragraph', text: "It's submitted.\nPlease review." },
      { kind: 'link', label: 'Review <it>', path: '/programs/d?a=1&b=2' },
    ],
    APP,
  );

  it('says the same in both parts', () => {
    expect(text).toContain('Baseline <4> & "more"\n\nIt\'s submitted.\nPlease review.');
    expect(text).toContain('Review <it>:\nhttps://polhode.example/programs/d?a=1&b=2');
    expect(html).toContain('It&#39;s submitted.<br>Please review.');
    expect(html).toContain('href="https://polhode.example/programs/d?a=1&amp;b=2"');
  });

  it('lets no text become markup', () => {
    expect(html).toContain('Baseline &lt;4&gt; &amp; &quot;more&quot;');
    expect(html).toContain('Review &lt;it&gt;');
    expect(html).not.toContain('<it>');
  });
});

describe('a link in a message', () => {
  it('leads to the application', () => {
    expect(linkTo('/a/b', APP)).toBe('https://polhode.example/a/b');
  });

  it.each(['//evil.example/x', 'https://evil.example', 'a', 'javascript:alert(1)', '/\\evil.example'])(
    'is refused when its path is %s',
    (path) => {
      expect(() => linkTo(path, APP)).toThrow('is not a path of this application');
    },
  );
});
