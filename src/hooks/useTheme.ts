import { useEffect, useSyncExternalStore } from 'react';
import {
  chooseTheme,
  onThemeChanged,
  rememberedTheme,
  restoreTheme,
  showTheme,
  shownTheme,
} from '@/lib/theme';

const BENCH = 'cragline.benchTheme';

/** The theme in force and how to choose another. */
export function useTheme() {
  const theme = useSyncExternalStore(onThemeChanged, shownTheme);
  return { theme, switchTheme: chooseTheme };
}

/** At the bench: dark unless somebody chose otherwise there. The other pages keep their own choice. */
export function useBenchTheme() {
  const theme = useSyncExternalStore(onThemeChanged, shownTheme);
  useEffect(() => {
    showTheme(rememberedTheme(BENCH) ?? 'dark');
    return restoreTheme;
  }, []);
  return { theme, switchTheme: (chosen: typeof theme) => chooseTheme(chosen, BENCH) };
}
