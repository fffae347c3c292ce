import type { Config } from 'tailwindcss';

const token = (name: string) => `var(--${name})`;
const named = (names: readonly string[]) =>
  Object.fromEntries(names.map((name) => [name, token(name)]));

/** Names the tokens of src/styles/tokens.css and replaces the default palette: no other colour exists. */
export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ...named([
        'paper',
        'surface',
        'sunk',
        'line',
        'line-strong',
        'ink',
        'ink-2',
        'ink-3',
        'accent',
        'accent-deep',
        'accent-wash',
        'on-accent',
        'caution',
        'caution-mark',
        'caution-wash',
        'stop',
        'stop-wash',
        'focus',
        'spark',
        'veil',
        ...Array.from({ length: 9 }, (_, band) => `map-${band}`),
      ]),
    },
    spacing: {
      0: '0',
      px: '1px',
      1: token('s1'),
      2: token('s2'),
      3: token('s3'),
      4: token('s4'),
      5: token('s5'),
      6: token('s6'),
      8: token('s8'),
      10: token('s10'),
      12: token('s12'),
      16: token('s16'),
      target: token('target'),
    },
    fontSize: Object.fromEntries(
      [1, 2, 3, 4, 5, 6, 7, 8, 9].map((n) => [
        n,
        [token(`text-${n}`), { lineHeight: token(`lead-${n}`) }],
      ]),
    ),
    fontWeight: { body: '400', mark: '500', head: '600' },
    fontFamily: { sans: [token('font-sans')], mono: [token('font-mono')] },
    borderRadius: { none: '0', DEFAULT: token('radius'), full: token('radius-round') },
    backgroundImage: { none: 'none', 'hatch-infeasible': token('hatch-infeasible') },
    maxWidth: {
      measure: token('measure'),
      form: '46rem',
      page: '90rem',
      none: 'none',
      full: '100%',
    },
    screens: { phone: '40.0625rem', desk: '64rem', wide: '73.8125rem' },
  },
} satisfies Config;
