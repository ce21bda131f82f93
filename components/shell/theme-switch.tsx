'use client';

import { useState } from 'react';
import { type Theme, themeCookie, THEMES } from '@/components/shell/theme';

const WORDS: Record<Theme, string> = { system: 'System', light: 'Light', dark: 'Dark' };

/** Paper or night, or as the system says. Set at once and kept in a cookie, which the server reads: nothing flashes. */
export function ThemeSwitch({ theme }: { readonly theme: Theme }) {
  const [chosen, setChosen] = useState(theme);
  const choose = (next: Theme) => {
    applyTheme(next);
    setChosen(next);
  };
  return (
    <fieldset className="no-print flex items-center gap-3">
      <legend className="sr-only">Theme</legend>
      {THEMES.map((each) => (
        <label key={each} className="switch-word">
          <input
            type="radio"
            name="theme"
            value={each}
            checked={chosen === each}
            onChange={() => choose(each)}
            className="sr-only"
          />
          {WORDS[each]}
        </label>
      ))}
    </fieldset>
  );
}

function applyTheme(theme: Theme): void {
  document.cookie = themeCookie(theme, window.location.protocol === 'https:');
  if (theme === 'system') delete document.documentElement.dataset['theme'];
  else document.documentElement.dataset['theme'] = theme;
}
