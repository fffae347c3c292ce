export type Theme = 'light' | 'dark';

const KEY = 'cragline-theme';
const listeners = new Set<() => void>();

function stored(): Theme | null {
  try {
    const value = localStorage.getItem(KEY);
    return value === 'light' || value === 'dark' ? value : null;
  } catch {
    // private windows may refuse storage; the system's preference stands
    return null;
  }
}

/** The theme in force: the person’s choice, else the system’s preference. */
export function currentTheme(): Theme {
  return stored() ?? (window.matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light');
}

export function applyTheme(): void {
  document.documentElement.dataset['theme'] = currentTheme();
}

export function chooseTheme(theme: Theme): void {
  try {
    localStorage.setItem(KEY, theme);
  } catch {
    // it holds for this page only, then
  }
  document.documentElement.dataset['theme'] = theme;
  for (const listener of listeners) listener();
}

/** For `useSyncExternalStore`: charts read their colours anew when the theme changes. */
export function onThemeChange(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}
