import Link from 'next/link';
import { cookies } from 'next/headers';
import { type ReactNode } from 'react';
import { BrandMark } from '@/components/shell/brand';
import { type Station, StationRule } from '@/components/shell/station-rule';
import { THEME_COOKIE, themeFromCookie } from '@/components/shell/theme';
import { ThemeSwitch } from '@/components/shell/theme-switch';
import { classes } from '@/components/ui/classes';
import { KeyHelp, type KeyLine } from '@/components/ui/key-help';
import { MarkingStrip } from '@/components/ui/marking-strip';

interface PageFrameProps {
  readonly children: ReactNode;
  readonly program?: { readonly title: string; readonly href: string };
  /** Who is signed in: their name, the page about them, and the form that signs out. */
  readonly person?: { readonly name: string; readonly href: string; readonly signOut: ReactNode };
  readonly stations?: readonly Station[];
  readonly current?: string | null;
  /** The highest marking of what is on the page. */
  readonly marking?: string | null;
  /** Links at the right of the top line, e.g. the program's settings, administration. */
  readonly links?: readonly { readonly href: string; readonly words: string }[];
  /** Keys of this page, added to those that work everywhere. */
  readonly keys?: readonly KeyLine[];
  /** `wide` fills the window (tables), `narrow` holds one form. */
  readonly width?: 'wide' | 'narrow';
}

/** The frame of every page: marking, top line, station rule, content. */
export async function PageFrame(props: PageFrameProps) {
  const {
    children,
    program,
    person,
    stations,
    current = null,
    marking,
    links = [],
    keys = [],
    width = 'wide',
  } = props;
  const theme = themeFromCookie((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <div className="page flex min-h-screen flex-col">
      <a
        href="#content"
        className="sr-only z-40 bg-sheet px-4 py-2 focus:not-sr-only focus:absolute focus:top-2 focus:left-2"
      >
        Skip to the content
      </a>
      {marking ? <MarkingStrip marking={marking} /> : null}
      <div className="page-body flex flex-1 flex-col">
        <header className="no-print flex flex-wrap items-center gap-x-6 gap-y-1 px-4 pt-3 pb-1 sm:px-6">
          <Link href="/" className="flex items-center gap-2">
            <BrandMark />
            <span className="text-lead font-semibold">Polhode</span>
          </Link>
          {program ? (
            <Link
              href={program.href}
              className="min-w-0 truncate text-lead hover:underline hover:underline-offset-4"
            >
              {program.title}
            </Link>
          ) : null}
          <div className="ml-auto flex flex-wrap items-center gap-x-6 gap-y-1">
            {links.map((link) => (
              <Link key={link.href} href={link.href} className="hover:underline hover:underline-offset-4">
                {link.words}
              </Link>
            ))}
            {person ? (
              <>
                <Link href={person.href} className="hover:underline hover:underline-offset-4">
                  {person.name}
                </Link>
                {person.signOut}
              </>
            ) : null}
          </div>
        </header>
        {stations && stations.length > 0 ? <StationRule stations={stations} current={current} /> : null}
        <main
          id="content"
          tabIndex={-1}
          className={classes(
            'grid w-full min-w-0 flex-1 content-start gap-8 px-4 py-8 outline-none sm:px-6',
            width === 'narrow' ? 'mx-auto max-w-160' : 'max-w-480',
          )}
        >
          {children}
        </main>
        <footer className="no-print flex flex-wrap items-center gap-x-6 gap-y-2 border-t border-rule px-4 py-2 text-ink-2 sm:px-6">
          <ThemeSwitch theme={theme} />
          <span className="ml-auto">
            <KeyHelp keys={keys} />
          </span>
        </footer>
      </div>
    </div>
  );
}
