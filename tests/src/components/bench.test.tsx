import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { CheckList } from '@/components/CheckList';
import { DialTile } from '@/components/DialTile';
import { SavedMark } from '@/components/SavedMark';
import { StepStrip } from '@/components/StepStrip';
import { TermBoard, type Term } from '@/components/TermBoard';
import { ThemeSwitch } from '@/components/ThemeSwitch';
import { useBenchTheme, useTheme } from '@/hooks/useTheme';
import { accessibilityProblems } from '@tests/support/accessibility';

const term = (key: string, row: number, column: number, state: Term['state'] = 'in'): Term => ({
  key,
  name: key,
  row,
  column,
  state,
  estimate: state === 'in' ? 1.25 : null,
  weight: 0.5,
  ...(state === 'notEstimable' ? { reason: 'Too few distinct gaps.' } : {}),
});
const TERMS = [
  term('V', -1, 0),
  term('g', -1, 1),
  term('V²', 0, 0),
  term('V·g', 1, 0, 'out'),
  term('g²', 1, 1, 'notEstimable'),
];

describe('TermBoard', () => {
  it('moves with the arrows and takes in or out with Space', async () => {
    const onToggled = vi.fn();
    const { container } = render(
      <TermBoard label="Terms" factors={['voltage', 'gap']} terms={TERMS} onToggled={onToggled} />,
    );
    screen.getByRole('button', { name: 'V +1.3' }).focus();
    await userEvent.keyboard('{ArrowDown}{ArrowDown}{ }');
    expect(onToggled).toHaveBeenCalledExactlyOnceWith('V·g');
    expect(screen.getByRole('button', { name: 'V·g left out' })).not.toBePressed();
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('says why a term cannot be estimated, and leaves it', async () => {
    const onToggled = vi.fn();
    render(
      <TermBoard label="Terms" factors={['voltage', 'gap']} terms={TERMS} onToggled={onToggled} />,
    );
    const cell = screen.getByRole('button', { name: /g² not estimable. Too few distinct gaps./ });
    await userEvent.click(cell);
    expect(cell).toHaveAttribute('aria-disabled', 'true');
    expect(onToggled).not.toHaveBeenCalled();
  });
});

describe('at the bench', () => {
  it('reads as sentences', async () => {
    const { container } = render(
      <>
        <DialTile name="Voltage" figure="160" unit="kV" change={{ from: '180', isUp: false }} />
        <DialTile name="Gap" figure="34" unit="mm" change={null} />
        <StepStrip name="Steps of this run" steps={['Dial in', 'Check', 'Pulse']} now={1} />
        <SavedMark state="here" claim="Saved on this tablet 10:42" note="1 entry waits" />
        <CheckList items={[{ key: 'a', fill: 'half', state: 'partly', text: 'Drift' }]} />
      </>,
    );
    expect(screen.getByText('↓ from 180')).toBeVisible();
    expect(screen.getByText('as before')).toBeVisible();
    expect(screen.getByRole('status')).toHaveTextContent('Saved on this tablet 10:42');
    expect(screen.getByRole('img', { name: 'partly' })).toBeVisible();
    expect(await accessibilityProblems(container)).toEqual([]);
  });
});

describe('theme', () => {
  afterEach(() => {
    localStorage.clear();
    delete document.documentElement.dataset['theme'];
  });
  const shown = () => document.documentElement.dataset['theme'];

  function Page() {
    const { theme, switchTheme } = useTheme();
    return <ThemeSwitch theme={theme} onSwitched={switchTheme} />;
  }
  function Bench() {
    const { theme, switchTheme } = useBenchTheme();
    return <ThemeSwitch theme={theme} onSwitched={switchTheme} />;
  }

  it('changes, and is remembered', async () => {
    render(<Page />);
    await userEvent.click(screen.getByRole('button', { name: 'Switch to the dark theme' }));
    expect(shown()).toBe('dark');
    expect(localStorage.getItem('cragline.theme')).toBe('dark');
    expect(screen.getByRole('button', { name: 'Switch to the light theme' })).toBeVisible();
  });

  it('is dark at the bench and as before after it', async () => {
    localStorage.setItem('cragline.theme', 'light');
    const { unmount } = render(<Bench />);
    expect(shown()).toBe('dark');
    await userEvent.click(screen.getByRole('button', { name: 'Switch to the light theme' }));
    expect(shown()).toBe('light');
    expect(localStorage.getItem('cragline.benchTheme')).toBe('light');
    unmount();
    expect(shown()).toBe('light');
  });
});
