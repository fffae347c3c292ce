import { useEffect, useState, type RefObject } from 'react';
import { CHART_TOKENS, type ChartTokens } from './tokens';

export interface ChartSurface {
  readonly width: number;
  readonly tokens: ChartTokens;
}

function readTokens(element: Element): ChartTokens {
  const styles = getComputedStyle(element);
  return Object.fromEntries(
    CHART_TOKENS.map((name) => [name, styles.getPropertyValue(`--${name}`).trim()]),
  ) as ChartTokens; // every name of the list is given
}

const isSame = (one: ChartSurface | null, other: ChartSurface) =>
  one?.width === other.width &&
  CHART_TOKENS.every((name) => one.tokens[name] === other.tokens[name]);

/**
 * The width of an element and the colours in force on it: read when it appears, when its size changes
 * and when the theme does. Null until it is laid out.
 */
export function useChartSurface(ref: RefObject<HTMLElement | null>): ChartSurface | null {
  const [surface, setSurface] = useState<ChartSurface | null>(null);
  useEffect(() => {
    const element = ref.current;
    if (!element) return;
    const read = () => {
      const next = { width: Math.floor(element.clientWidth), tokens: readTokens(element) };
      if (next.width > 0) setSurface((before) => (isSame(before, next) ? before : next));
    };
    const size = new ResizeObserver(read);
    const theme = new MutationObserver(read);
    const scheme = window.matchMedia('(prefers-color-scheme: dark)');
    size.observe(element);
    theme.observe(document.documentElement, { attributeFilter: ['data-theme'] });
    scheme.addEventListener('change', read);
    return () => {
      size.disconnect();
      theme.disconnect();
      scheme.removeEventListener('change', read);
    };
  }, [ref]);
  return surface;
}
