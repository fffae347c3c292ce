import { useSyncExternalStore } from 'react';

export type Theme = 'light' | 'dark';

const KEY = 'cragline.theme';
const listeners = new Set<() => void>();

function systemTheme(): Theme {
  return window.matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light';
}

function storedTheme(): Theme | null {
  const stored = localStorage.getItem(KEY);
  return stored === 'light' || stored === 'dark' ? stored : null;
}

/** What the page shows: the chosen theme, else the system's. */
function currentTheme(): Theme {
  const set = document.documentElement.dataset['theme'];
  return set === 'light' || set === 'dark' ? set : systemTheme();
}

function subscribe(listener: () => void) {
  const query = window.matchMedia('(prefers-color-scheme: dark)');
  listeners.add(listener);
  query.addEventListener('change', listener);
  return () => {
    listeners.delete(listener);
    query.removeEventListener('change', listener);
  };
}

function switchTheme(theme: Theme): void {
  localStorage.setItem(KEY, theme);
  document.documentElement.dataset['theme'] = theme;
  listeners.forEach((listener) => listener());
}

/** Puts the remembered choice on the document; called once, before the first render. */
export function restoreTheme(): void {
  const stored = storedTheme();
  if (stored) document.documentElement.dataset['theme'] = stored;
}

/** The theme in force and how to change it. It is the browser's, not the person's: tablets are shared. */
export function useTheme() {
  const theme = useSyncExternalStore(subscribe, currentTheme);
  return { theme, switchTheme };
}
