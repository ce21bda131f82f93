import '@fontsource/ibm-plex-sans/400.css';
import '@fontsource/ibm-plex-sans/600.css';
import '@fontsource/ibm-plex-mono/400.css';
import '@fontsource/ibm-plex-mono/600.css';
import './globals.css';
import { type Metadata, type Viewport } from 'next';
import { cookies } from 'next/headers';
import { type ReactNode } from 'react';
import { THEME_COOKIE, themeFromCookie } from '@/components/shell/theme';

export const metadata: Metadata = {
  title: { default: 'Polhode', template: '%s · Polhode' },
  description:
    'Mass and inertia baselines of an aircraft program, from the component mass list to the simulator.',
};

export const viewport: Viewport = {
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#f6f3ea' },
    { media: '(prefers-color-scheme: dark)', color: '#171b20' },
  ],
};

export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  const theme = themeFromCookie((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <html lang="en" {...(theme === 'system' ? {} : { 'data-theme': theme })}>
      <body>{children}</body>
    </html>
  );
}
