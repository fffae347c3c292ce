export type Theme = 'light' | 'dark';

const CHOSEN = 'cragline.theme';
const listeners = new Set<() => void>();

const isTheme = (text: string | null | undefined): text is Theme =>
  text === 'light' || text === 'dark';

export function rememberedTheme(key: string): Theme | null {
  const text = localStorage.getItem(key);
  return isTheme(text) ? text : null;
}

function systemTheme(): Theme {
  return window.matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light';
}

/** What the page shows: what was put on the document, else the system's. */
export function shownTheme(): Theme {
  const shown = document.documentElement.dataset['theme'];
  return isTheme(shown) ? shown : systemTheme();
}

/** Puts a theme on the document, dialogs included; null leaves it to the system. */
export function showTheme(theme: Theme | null): void {
  if (theme) document.documentElement.dataset['theme'] = theme;
  else delete document.documentElement.dataset['theme'];
  listeners.forEach((listener) => listener());
}

/** Shows the remembered choice; called once before the first render, and when the bench is left. */
export function restoreTheme(): void {
  showTheme(rememberedTheme(CHOSEN));
}

/** Shows and remembers. It is the browser's, not the person's: tablets are shared. */
export function chooseTheme(theme: Theme, key = CHOSEN): void {
  localStorage.setItem(key, theme);
  showTheme(theme);
}

export function onThemeChanged(listener: () => void): () => void {
  const scheme = window.matchMedia('(prefers-color-scheme: dark)');
  listeners.add(listener);
  scheme.addEventListener('change', listener);
  return () => {
    listeners.delete(listener);
    scheme.removeEventListener('change', listener);
  };
}
