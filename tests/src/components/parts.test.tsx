import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { MemoryRouter } from 'react-router-dom';
import { describe, expect, it, vi } from 'vitest';
import { AppBar } from '@/components/AppBar';
import { Button } from '@/components/Button';
import { DataTable, sortRows, type Column } from '@/components/DataTable';
import { Dialog } from '@/components/Dialog';
import { EmptyState, ForbiddenState } from '@/components/EmptyState';
import { ErrorState } from '@/components/ErrorState';
import { GoalRow } from '@/components/GoalRow';
import { HundredSquares, type Outcome } from '@/components/HundredSquares';
import { LedgerBar } from '@/components/LedgerBar';
import { LoadingState } from '@/components/LoadingState';
import { Menu } from '@/components/Menu';
import { PageHeader } from '@/components/PageHeader';
import { initialsOf, PersonMenu } from '@/components/PersonMenu';
import { SignatureBlock } from '@/components/SignatureBlock';
import { Tabs } from '@/components/Tabs';
import { useSort } from '@/hooks/useSort';
import { accessibilityProblems } from '@tests/support/accessibility';

interface Row {
  readonly term: string;
  readonly estimate: number | null;
}
const rows: readonly Row[] = [
  { term: 'Voltage', estimate: 6.9 },
  { term: 'Gap', estimate: null },
  { term: 'Pulses', estimate: 9 },
];
const columns: readonly Column<Row>[] = [
  { key: 'term', header: 'Term', cell: ({ term }) => term, sortValue: ({ term }) => term },
  {
    key: 'estimate',
    header: 'Estimate',
    unit: 'points',
    numeric: true,
    cell: ({ estimate }) => estimate,
    sortValue: ({ estimate }) => estimate,
  },
];

function Table({ onPicked }: { onPicked?: (row: Row) => void }) {
  const sort = useSort();
  return (
    <DataTable
      caption="Coefficients"
      columns={columns}
      rows={rows}
      rowKey={({ term }) => term}
      sort={sort}
      picked={onPicked ? { key: 'Gap', onPicked } : undefined}
    />
  );
}

const firstCells = () =>
  screen
    .getAllByRole('row')
    .slice(1)
    .map((row) => within(row).getAllByRole('cell')[0]?.textContent);

describe('DataTable', () => {
  it('sorts both ways by its heads and leaves missing values last', async () => {
    const { container } = render(<Table />);
    const head = screen.getByRole('button', { name: 'Estimate, points' });
    await userEvent.click(head);
    expect(firstCells()).toEqual(['Voltage', 'Pulses', 'Gap']);
    await userEvent.click(head);
    expect(firstCells()).toEqual(['Pulses', 'Voltage', 'Gap']);
    expect(screen.getByRole('columnheader', { name: 'Estimate, points' })).toHaveAttribute(
      'aria-sort',
      'descending',
    );
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('picks a row by keyboard, once', async () => {
    const onPicked = vi.fn();
    render(<Table onPicked={onPicked} />);
    await userEvent.click(screen.getByRole('button', { name: 'Pulses' }));
    expect(onPicked).toHaveBeenCalledExactlyOnceWith(rows[2]);
    expect(screen.getByRole('button', { name: 'Gap' })).toHaveAttribute('aria-pressed', 'true');
  });

  it('says what is missing when there are no rows', () => {
    render(
      <DataTable
        caption="Runs"
        columns={columns}
        rows={[]}
        rowKey={({ term }) => term}
        whenEmpty="No run is recorded yet."
      />,
    );
    expect(screen.getByText('No run is recorded yet.')).toBeVisible();
  });

  it('keeps the order of equals and of unsorted rows', () => {
    expect(sortRows(rows, columns, null)).toBe(rows);
    expect(sortRows(rows, columns, { key: 'unknown', isDescending: false })).toBe(rows);
  });
});

describe('layers', () => {
  function Question({ onVoided }: { onVoided: () => void }) {
    const [isOpen, setOpen] = useState(false);
    return (
      <>
        <Button onClick={() => setOpen(true)}>Void</Button>
        <Dialog
          title="Void run 12?"
          description="It must be repeated."
          isOpen={isOpen}
          onClosed={() => setOpen(false)}
          action={<Button onClick={onVoided}>Void run 12</Button>}
        />
      </>
    );
  }

  it('asks, answers, and gives the focus back on Esc', async () => {
    const onVoided = vi.fn();
    render(<Question onVoided={onVoided} />);
    await userEvent.click(screen.getByRole('button', { name: 'Void' }));
    const dialog = screen.getByRole('dialog', { name: 'Void run 12?' });
    expect(dialog).toHaveAccessibleDescription('It must be repeated.');
    await userEvent.click(within(dialog).getByRole('button', { name: 'Void run 12' }));
    expect(onVoided).toHaveBeenCalledOnce();
    await userEvent.keyboard('{Escape}');
    expect(screen.queryByRole('dialog')).not.toBeInTheDocument();
    expect(screen.getByRole('button', { name: 'Void' })).toHaveFocus();
  });

  it('opens a menu by key and leaves what is refused alone', async () => {
    const onChosen = vi.fn();
    const onRefused = vi.fn();
    render(
      <Menu
        trigger={<Button>More</Button>}
        items={[
          { key: 'copy', label: 'Copy this study', onChosen },
          { key: 'csv', label: 'Export', onChosen: onRefused, isDisabled: true },
        ]}
      />,
    );
    screen.getByRole('button', { name: 'More' }).focus();
    await userEvent.keyboard('{Enter}{Enter}');
    expect(onChosen).toHaveBeenCalledOnce();
    expect(onRefused).not.toHaveBeenCalled();
  });

  it('changes tabs with the arrows', async () => {
    const onOpened = vi.fn();
    render(
      <Tabs
        label="Parts"
        open="terms"
        onOpened={onOpened}
        tabs={[
          { key: 'terms', label: 'Terms', content: 'Ten terms.' },
          { key: 'anova', label: 'ANOVA', content: 'Five rows.' },
        ]}
      />,
    );
    screen.getByRole('tab', { name: 'Terms' }).focus();
    await userEvent.keyboard('{ArrowRight}');
    expect(onOpened).toHaveBeenCalledWith('anova');
    expect(screen.getByRole('tabpanel')).toHaveTextContent('Ten terms.');
  });
});

describe('frame of a page', () => {
  it('says where I am, how far the study is, and who I am', async () => {
    const { container } = render(
      <MemoryRouter>
        <AppBar home="/" crumbs={[{ label: 'Studies', to: '/' }, { label: 'TV-041' }]} lab="Lab">
          <PersonMenu name="Ines Hallworth" role="Lead" items={[]} />
        </AppBar>
        <PageHeader
          title="Coarse sand"
          stages={[
            { name: 'Brief', state: 'walked', to: '/brief' },
            { name: 'Bench', state: 'now' },
            { name: 'Release', state: 'ahead' },
          ]}
          action={<Button variant="primary">Record</Button>}
        />
      </MemoryRouter>,
    );
    expect(screen.getByRole('link', { name: 'Cragline' })).toHaveAttribute('href', '/');
    expect(screen.getByText('TV-041')).toHaveAttribute('aria-current', 'page');
    const steps = within(screen.getByRole('list', { name: 'Stages of this study' }));
    const now = steps.getAllByRole('listitem').find((item) => item.ariaCurrent === 'step');
    expect(now ?? steps.getAllByRole('listitem')[1]).toHaveTextContent('Bench, now');
    expect(screen.getByText('Stage 2 of 3: Bench')).toBeInTheDocument();
    expect(screen.getByRole('button', { name: 'IH, signed in as Ines Hallworth' })).toBeVisible();
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('shortens names to two letters', () => {
    expect(['Ines Hallworth', 'Ana María de Soto', 'Óskar', ''].map(initialsOf)).toEqual([
      'IH',
      'AS',
      'ÓS',
      '',
    ]);
  });
});

describe('numbers', () => {
  it('gives a prediction its goal, interval and word', async () => {
    const { container } = render(
      <GoalRow
        name="Dust"
        unit="%"
        digits={2}
        scale={{ low: 3, high: 10 }}
        goal={{ side: 'range', limits: [4, 7] }}
        prediction={{
          value: 6.28,
          mean: { low: 6, high: 6.6 },
          single: { low: 5.52, high: 7.04 },
        }}
        state="touches"
      />,
    );
    expect(screen.getByText('4 to 7 %')).toBeVisible();
    expect(screen.getByText('5.52 to 7.04')).toBeVisible();
    expect(screen.getByText('touches')).toBeVisible();
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('shows a missing prediction as missing', () => {
    render(
      <GoalRow
        name="Dust"
        unit="%"
        digits={2}
        scale={{ low: 3, high: 10 }}
        goal={null}
        prediction={{ value: null, mean: null, single: null }}
        state="unknown"
      />,
    );
    expect(screen.getByText('—')).toBeVisible();
    expect(screen.getByText('not known')).toBeVisible();
  });

  it('counts a hundred draws in its name', () => {
    const outcomes: Outcome[] = [
      ...Array<Outcome>(91).fill('holds'),
      ...Array<Outcome>(9).fill('above'),
    ];
    render(<HundredSquares outcomes={outcomes} />);
    expect(
      screen.getByRole('img', { name: '91 of 100 imagined repeats meet every goal' }),
    ).toBeVisible();
  });

  it('keeps the books of a sample in a table', async () => {
    const { container } = render(
      <>
        <LedgerBar
          total={{ label: 'Received', massG: 12_400 }}
          parts={[{ kind: 'left', label: 'Left: 13 bags', massG: 4170 }]}
        />
        <SignatureBlock
          name="Signature block"
          cells={[{ label: 'Confirmed', value: 'waits for 3 runs', isWaiting: true }]}
        />
      </>,
    );
    expect(screen.getByRole('row', { name: /Left: 13 bags/ })).toHaveTextContent('4.17 kg');
    expect(screen.getByRole('region', { name: 'Signature block' })).toBeVisible();
    expect(await accessibilityProblems(container)).toEqual([]);
  });
});

describe('states', () => {
  it('offer the way on', async () => {
    const [onRetry, onStop] = [vi.fn(), vi.fn()];
    const { container } = render(
      <>
        <EmptyState title="No runs yet" action={<Button>Open run 1</Button>} />
        <LoadingState label="Looking" progress={{ done: 4210, total: 17_093 }} onStop={onStop} />
        <ErrorState claim="Run 16 was not saved." onRetry={onRetry}>
          Your 14 masses are kept.
        </ErrorState>
        <ForbiddenState title="Signing is for leads" />
      </>,
    );
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    await userEvent.click(screen.getByRole('button', { name: 'Stop' }));
    expect(onRetry).toHaveBeenCalledOnce();
    expect(onStop).toHaveBeenCalledOnce();
    expect(screen.getByText('4210 of 17 093')).toBeVisible();
    expect(screen.getByRole('alert')).toHaveTextContent('Your 14 masses are kept.');
    expect(await accessibilityProblems(container)).toEqual([]);
  });
});
