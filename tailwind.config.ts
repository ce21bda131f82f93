import { type Config } from 'tailwindcss';

/** The scale of the look: colours are the variables of app/globals.css, lengths sit on an 8 px grid (4 px inside rows). */
const config: Config = {
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      paper: 'var(--paper)',
      sheet: 'var(--sheet)',
      ink: { DEFAULT: 'var(--ink)', 2: 'var(--ink-2)' },
      rule: 'var(--rule)',
      spin: { DEFAULT: 'var(--spin)', deep: 'var(--spin-deep)', on: 'var(--on-spin)' },
      limit: 'var(--limit)',
      caution: 'var(--caution)',
      pass: 'var(--pass)',
      hover: 'var(--hover)',
      chosen: 'var(--chosen)',
      plus: 'var(--plus)',
      minus: 'var(--minus)',
    },
    screens: { sm: '600px', md: '900px', lg: '1200px', xl: '1440px' },
    fontFamily: {
      sans: ['"IBM Plex Sans"', 'system-ui', 'sans-serif'],
      mono: ['"IBM Plex Mono"', '"IBM Plex Sans"', 'ui-monospace', 'monospace'],
    },
    fontSize: {
      note: ['12px', '16px'],
      body: ['14px', '20px'],
      lead: ['16px', '24px'],
      section: ['20px', '28px'],
      title: ['28px', '36px'],
      total: ['36px', '40px'],
    },
    fontWeight: { normal: '400', semibold: '600' },
    borderRadius: { none: '0', DEFAULT: '2px' },
    boxShadow: {},
  },
};

export default config;
