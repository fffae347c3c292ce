import type { Config } from 'tailwindcss';

/** The tokens by name. Each group replaces the default one, so a colour or size outside the look does not exist. */
const token = (name: string) => `var(--${name})`;
const tokens = (names: readonly string[]) =>
  Object.fromEntries(names.map((name) => [name, token(name)]));
const pixels = (...sizes: readonly number[]) =>
  Object.fromEntries(sizes.map((size) => [String(size / 4), `${size}px`]));
const type = (name: string, lead = name) =>
  [token(`text-${name}`), token(`lead-${lead}`)] as [string, string];

const grounds = ['paper', 'surface', 'sunk', 'line', 'line-strong', 'veil', 'shade'];
const inks = ['ink', 'ink-2', 'ink-3', 'focus', 'spark', 'spark-halo'];
const accents = ['accent', 'accent-deep', 'accent-wash', 'on-accent'];
const warnings = ['caution', 'caution-mark', 'caution-wash', 'on-caution', 'stop', 'stop-wash'];
const maps = [0, 1, 2, 3, 4, 5, 6, 7, 8].map((band) => `map-${band}`);
const lines = ['isoline', 'isolabel', 'isolabel-on-dark'];
const series = [1, 2, 3, 4, 5].map((count) => `series-${count}`);

/** 4 px steps; 9 is a target, 11 a target on phones, 16 one at the bench, 24 its primary. */
const spacing = {
  0: '0px',
  px: '1px',
  ...pixels(2, 4, 6, 8, 10, 12, 14, 16, 18, 20, 24, 28, 32, 36, 40, 44, 48, 56, 64, 72, 80, 96),
  ...pixels(112, 120, 128, 144, 160, 192, 224, 256, 320, 384, 448, 480, 560, 640),
};

export default {
  content: [],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ...tokens([...grounds, ...inks, ...accents, ...warnings, ...maps, ...lines, ...series]),
    },
    fontFamily: { sans: token('font-sans'), mono: token('font-mono') },
    fontSize: {
      label: type('label'),
      // step 1 is a utility in index.css: Tailwind takes a key of 1 for the line height of its neighbour
      ...Object.fromEntries(
        ['2', '3', '4', '5', '6', '7', '8', '9'].map((step) => [step, type(step)]),
      ),
      'dial-1': type('dial-1'),
      'dial-2': type('dial-2'),
    },
    fontWeight: { body: '400', mark: '500', head: '600' },
    spacing,
    maxWidth: { ...spacing, none: 'none', full: '100%', measure: token('measure'), page: '1440px' },
    borderRadius: { none: '0px', DEFAULT: token('radius'), round: '999px' },
    borderWidth: { 0: '0px', DEFAULT: '1px', 2: '2px', 3: '3px', 4: '4px', frame: '1.5px' },
    boxShadow: { none: 'none', float: token('float') },
    screens: { sm: '641px', md: '901px', lg: '1181px' },
    transitionDuration: { DEFAULT: token('fast'), fast: token('fast'), calm: token('calm') },
    transitionTimingFunction: { DEFAULT: token('ease') },
    backgroundImage: {
      none: 'none',
      'hatch-infeasible': token('hatch-infeasible'),
      'hatch-practice': token('hatch-practice'),
      'hatch-reserved': token('hatch-reserved'),
      'hatch-lost': token('hatch-lost'),
      'half-fill': token('half-fill'),
    },
    extend: {
      maxHeight: { dialog: 'calc(100vh - 96px)' },
      gridTemplateColumns: {
        'main-aside': 'minmax(0, 1fr) minmax(0, 476px)',
        'main-action': 'minmax(0, 1fr) auto',
        'main-side': 'minmax(0, 1fr) 344px',
        'page-header': 'minmax(260px, 424px) minmax(0, 1fr) auto',
        mark: '20px minmax(0, 1fr)',
        'mark-bench': '28px minmax(0, 1fr)',
        log: '92px minmax(0, 1fr)',
        goal: 'minmax(0, 1fr) 88px 116px 72px',
        setting: '84px 168px minmax(0, 1fr)',
      },
    },
  },
} satisfies Config;
