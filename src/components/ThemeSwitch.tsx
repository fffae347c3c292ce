import type { Theme } from '@/lib/theme';

interface ThemeSwitchProps {
  readonly theme: Theme;
  readonly onSwitched: (theme: Theme) => void;
}

/** Light or dark. The half-filled square is the same in both. */
export function ThemeSwitch({ theme, onSwitched }: ThemeSwitchProps) {
  const other = theme === 'light' ? 'dark' : 'light';
  return (
    <button
      type="button"
      onClick={() => onSwitched(other)}
      aria-label={`Switch to the ${other} theme`}
      className="grid size-9 flex-none place-items-center"
    >
      <svg viewBox="0 0 16 16" aria-hidden="true" className="size-4">
        <rect
          x={2}
          y={2}
          width={12}
          height={12}
          strokeWidth={1.4}
          className="fill-none stroke-ink-2"
        />
        <path d="M2 14L14 2V14Z" className="fill-ink-2" />
      </svg>
    </button>
  );
}
