'use client';

import { useState } from 'react';
import { themeCookie, themes, type Theme } from './theme';

const yearInSeconds = 31_536_000;

/** Cycles system, light, dark. A cookie and not local storage, so that the server can send the right page. */
export function ThemeSwitch({ initial }: { readonly initial: Theme }) {
  const [theme, setTheme] = useState(initial);

  function change() {
    const next = themes[(themes.indexOf(theme) + 1) % themes.length];
    setTheme(next);
    document.cookie = `${themeCookie}=${next}; path=/; max-age=${yearInSeconds}; samesite=lax`;
    if (next === 'system') delete document.documentElement.dataset.theme;
    else document.documentElement.dataset.theme = next;
  }

  return (
    <button
      type="button"
      onClick={change}
      aria-label={`Colours: ${theme}. Change.`}
      title="Colours: system, light or dark"
      className="inline-flex h-6 items-center gap-1.5 rounded-field text-small text-ash hover:text-ink"
    >
      <ThemeIcon theme={theme} />
      <span aria-hidden>{theme}</span>
    </button>
  );
}

/** A disc of the page's two colours: half each for system, hollow for light, filled for dark. */
function ThemeIcon({ theme }: { readonly theme: Theme }) {
  return (
    <svg viewBox="0 0 12 12" className="size-3" aria-hidden>
      <circle cx="6" cy="6" r="5.25" fill={theme === 'dark' ? 'currentColor' : 'none'} stroke="currentColor" strokeWidth="1.2" />
      {theme === 'system' && <path d="M6 .75a5.25 5.25 0 0 1 0 10.5z" fill="currentColor" />}
    </svg>
  );
}
