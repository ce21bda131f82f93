export type Theme = 'system' | 'light' | 'dark';
export const THEMES: readonly Theme[] = ['system', 'light', 'dark'];
export const THEME_COOKIE = 'polhode-theme';

/** The theme a cookie asks for; anything unknown follows the system. */
export function themeFromCookie(value: string | undefined): Theme {
  return value === 'light' || value === 'dark' ? value : 'system';
}

/** The cookie that keeps a choice for a year; `system` removes it. */
export function themeCookie(theme: Theme, secure: boolean): string {
  const age = theme === 'system' ? 0 : 31_536_000;
  return `${THEME_COOKIE}=${theme}; Path=/; Max-Age=${age}; SameSite=Lax${secure ? '; Secure' : ''}`;
}
