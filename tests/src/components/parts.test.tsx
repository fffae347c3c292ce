import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { MemoryRouter } from 'react-router-dom';
import { describe, expect, it, vi } from 'vitest';
import { Button, LinkButton } from '@/components/Button';
import { DataTable, type Column } from '@/components/DataTable';
import { GoalMark, goalState } from '@/components/GoalMark';
import { HundredSquares } from '@/components/HundredSquares';
import { IntervalBar } from '@/components/IntervalBar';
import { LedgerBar } from '@/components/LedgerBar';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { StageLine } from '@/components/StageLine';
import { EmptyState, ErrorState, ForbiddenState, LoadingState } from '@/components/states';
import { accessibilityProblems } from '@tests/support/accessibility';

interface Row {
  readonly term: string;
  readonly estimate: number;
}
const columns: readonly Column<Row>[] = [
  { key: 'term', header: 'Term', cell: ({ term }) => term },
  {
    key: 'estimate',
    header: 'Estimate',
    unit: 'points',
    numeric: true,
    cell: ({ estimate }) => estimate,
  },
];

describe('DataTable and Panel', () => {
  it('are found by their names; the unit stands in the head, once', async () => {
    const { container } = render(
      <Panel name="Coefficients" fact="coded −1 to +1">
        <DataTable
          caption="Coefficients"
          columns={columns}
          rows={[{ term: 'Voltage', estimate: 6.9 }]}
          rowKey={({ term }) => term}
        />
      </Panel>,
    );
    const panel = within(screen.getByRole('region', { name: 'Coefficients' }));
    expect(panel.getByRole('table', { name: 'Coefficients' })).toBeVisible();
    expect(panel.getByRole('columnheader', { name: 'Estimate, points' })).toBeVisible();
    expect(panel.getByRole('cell', { name: '6.9' })).toBeVisible();
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('say what is missing when there are no rows', () => {
    render(
      <DataTable
        caption="Runs"
        columns={columns}
        rows={[]}
        rowKey={({ term }) => term}
        empty="No run is recorded yet."
      />,
    );
    expect(screen.getByText('No run is recorded yet.')).toBeVisible();
  });
});

describe('StageLine', () => {
  it('says which stage is now, and leads to the others', async () => {
    const { container } = render(
      <MemoryRouter>
        <StageLine
          here="bench"
          stations={[
            { key: 'brief', name: 'Brief', to: '/brief', state: 'done' },
            { key: 'bench', name: 'Bench', to: '/bench', state: 'now', fact: '16 of 21' },
            { key: 'release', name: 'Release', to: '/release', state: 'next' },
          ]}
        />
      </MemoryRouter>,
    );
    const line = within(screen.getByRole('navigation', { name: 'Stages of this study' }));
    const now = line.getAllByRole('listitem')[1];
    expect(now).toHaveAttribute('aria-current', 'step');
    expect(now).toHaveTextContent('16 of 21');
    expect(line.getByRole('link', { name: 'Bench' })).toHaveAttribute('aria-current', 'page');
    expect(line.getByText('Stage 2 of 3: Bench')).toBeInTheDocument();
    expect(await accessibilityProblems(container)).toEqual([]);
  });
});

describe('goalState', () => {
  const limits = { low: 80, high: 95 };
  const at = (predicted: number, half: number) => ({
    predicted,
    piLow: predicted - half,
    piHigh: predicted + half,
  });

  it.each([
    ['maximise', 85, 4, 'holds'],
    ['maximise', 82, 4, 'touches'],
    ['maximise', 75, 4, 'misses'],
    ['minimise', 90, 4, 'holds'],
    ['minimise', 93, 4, 'touches'],
    ['minimise', 100, 4, 'misses'],
    ['within', 88, 4, 'holds'],
    ['within', 88, 10, 'touches'],
    ['within', 60, 10, 'misses'],
    ['target', 94, 4, 'touches'],
  ] as const)('to %s at %s ± %s %s', (aim, predicted, half, state) => {
    expect(goalState(aim, limits, at(predicted, half))).toBe(state);
  });

  it('judges a computed value, which has no interval, by itself', () => {
    const exact = { predicted: 80, piLow: null, piHigh: null };
    expect(goalState('maximise', limits, exact)).toBe('holds');
  });
});

describe('numbers', () => {
  it('say in words what they draw', async () => {
    const { container } = render(
      <>
        <GoalMark aim="minimise" state="touches" />
        <IntervalBar
          scale={[3, 10]}
          predicted={6.28}
          ci={[6, 6.6]}
          pi={[5.5, 7]}
          limits={[{ value: 7, holdsAbove: false }]}
        />
        <HundredSquares probability={0.914} error={0.004} />
        <LedgerBar usedG={7200} lostG={130} reservedG={900} leftG={4170} />
      </>,
    );
    expect(screen.getByText('touches')).toBeVisible();
    expect(
      screen.getByRole('img', { name: '91 of 100 imagined repeats meet every goal, ±0.4' }),
    ).toBeVisible();
    expect(screen.getByText('4.17 kg')).toBeVisible();
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('stay inside a scale that is too short for them', () => {
    const { container } = render(
      <IntervalBar scale={[0, 1]} predicted={5} ci={[4, 6]} pi={[-9, 9]} width={100} />,
    );
    for (const rect of container.querySelectorAll('rect'))
      expect(Number(rect.getAttribute('x'))).toBeLessThanOrEqual(100);
  });
});

describe('states', () => {
  it('offer the way on', async () => {
    const onRetry = vi.fn();
    const { container } = render(
      <MemoryRouter>
        <EmptyState title="No runs yet" action={<LinkButton to="/">Open run 1</LinkButton>}>
          The matrix is frozen.
        </EmptyState>
        <ErrorState error={new Error('The server did not answer.')} onRetry={onRetry} />
        <ForbiddenState why="Signing is for leads." action={<Button>Back</Button>} />
        <Notice tone="caution" claim="Beyond the ranges.">
          The interval is a guess there.
        </Notice>
      </MemoryRouter>,
    );
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(onRetry).toHaveBeenCalledOnce();
    expect(screen.getByRole('alert')).toHaveTextContent('The server did not answer.');
    expect(screen.getByRole('link', { name: 'Open run 1' })).toBeVisible();
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('wait still for 400 ms, then say what for and can be stopped', async () => {
    const onStop = vi.fn();
    render(<LoadingState what="Looking at 7093 settings" onStop={onStop} />);
    expect(screen.getByRole('status', { name: 'Looking at 7093 settings' })).toBeEmptyDOMElement();
    await userEvent.click(await screen.findByRole('button', { name: 'Stop' }));
    expect(onStop).toHaveBeenCalledOnce();
  });
});
