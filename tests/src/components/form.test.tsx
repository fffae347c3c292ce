import { zodResolver } from '@hookform/resolvers/zod';
import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { Button } from '@/components/Button';
import { Checkbox, Field, SelectField, TextArea } from '@/components/Field';
import { NumberField } from '@/components/NumberField';
import { Segments } from '@/components/Segments';
import { Stepper } from '@/components/Stepper';
import { accessibilityProblems } from '@tests/support/accessibility';

const schema = z.object({
  massG: z.number('Enter the mass that the balance showed.').positive('Enter a mass above 0 g.'),
});
type Weighing = z.input<typeof schema>;

function MassForm({ onSaved }: { onSaved: (weighing: Weighing) => void }) {
  const { control, handleSubmit } = useForm<Weighing>({ resolver: zodResolver(schema) });
  return (
    <form onSubmit={(event) => void handleSubmit(onSaved)(event)} noValidate>
      <NumberField control={control} name="massG" label="Dry feed" unit="g" hint="to 0.02 g" />
      <Button type="submit" look="primary">
        Record
      </Button>
    </form>
  );
}

describe('NumberField', () => {
  it.each([
    ['300,20', 300.2],
    ['0.3 kg', 300],
    ['1 234.5', 1234.5],
  ])('reads %s as people type it', async (typed, massG) => {
    const onSaved = vi.fn();
    render(<MassForm onSaved={onSaved} />);
    const field = screen.getByRole('textbox', { name: 'Dry feed' });
    expect(field).toHaveAccessibleDescription('to 0.02 g');
    await userEvent.type(field, typed);
    await userEvent.click(screen.getByRole('button', { name: 'Record' }));
    expect(onSaved.mock.calls[0]?.[0]).toEqual({ massG });
  });

  it('keeps what cannot be read, says what is wrong, and does not save', async () => {
    const onSaved = vi.fn();
    render(<MassForm onSaved={onSaved} />);
    const field = screen.getByRole('textbox', { name: 'Dry feed' });
    await userEvent.type(field, '~300');
    await userEvent.click(screen.getByRole('button', { name: 'Record' }));
    expect(field).toHaveValue('~300');
    expect(field).toBeInvalid();
    expect(field).toHaveAccessibleDescription(/is an estimate/);
    expect(onSaved).not.toHaveBeenCalled();
  });
});

describe('Field', () => {
  it('allows saving under a caution', () => {
    render(<Field label="Water" caution="Above 500: change the water." />);
    const field = screen.getByRole('textbox', { name: 'Water' });
    expect(field).toBeValid();
    expect(field).toHaveAccessibleDescription('Above 500: change the water.');
  });

  it('has no accessibility problem in any state, nor have its relatives', async () => {
    const { container } = render(
      <>
        <Field label="Mass" unit="g" error="Too much." hint="in grams" />
        <TextArea label="Reason" error="Say why." />
        <SelectField label="Rig" options={[{ value: 2, label: 'Rig 2' }]} error="Pick one." />
        <Checkbox label="Cell empty" error="Tick it." />
      </>,
    );
    expect(screen.getByRole('checkbox', { name: 'Cell empty' })).toHaveAccessibleDescription(
      'Tick it.',
    );
    expect(await accessibilityProblems(container)).toEqual([]);
  });
});

describe('Button', () => {
  it('takes no second press while it works', async () => {
    const onClick = vi.fn();
    render(
      <Button isBusy onClick={onClick}>
        Freeze
      </Button>,
    );
    await userEvent.click(screen.getByRole('button'));
    expect(onClick).not.toHaveBeenCalled();
    expect(screen.getByRole('button')).toHaveAttribute('aria-busy', 'true');
  });
});

describe('Segments', () => {
  function Views() {
    const [view, setView] = useState<'map' | 'table'>('map');
    return (
      <Segments
        label="View"
        value={view}
        onChange={setView}
        options={[
          { value: 'map', label: 'Map' },
          { value: 'table', label: 'Table' },
        ]}
      />
    );
  }

  it('is one stop for Tab, arrows move, and one is always on', async () => {
    const { container } = render(<Views />);
    await userEvent.tab();
    expect(screen.getByRole('radio', { name: 'Map' })).toHaveFocus();
    await userEvent.keyboard('{ArrowRight}');
    expect(screen.getByRole('radio', { name: 'Table' })).toHaveFocus();
    expect(screen.getByRole('radio', { name: 'Table' })).toBeChecked();
    expect(screen.getByRole('radio', { name: 'Map' })).not.toBeChecked();
    expect(await accessibilityProblems(container)).toEqual([]);
  });
});

describe('Stepper', () => {
  const values = [130, 135, 140, 145];

  it('moves one settable step and stops at the ends', async () => {
    const onChange = vi.fn();
    const { container } = render(
      <Stepper
        label="Voltage"
        unit="kV"
        value={140}
        values={values}
        allowed={new Set([135, 140])}
        onChange={onChange}
      />,
    );
    await userEvent.click(screen.getByRole('button', { name: 'Voltage one step up' }));
    await userEvent.click(screen.getByRole('button', { name: 'Voltage one step down' }));
    expect(onChange.mock.calls.flat()).toEqual([145, 135]);
    expect(screen.getByRole('status')).toHaveTextContent('140 kV');
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('has nothing below the lowest value', () => {
    render(
      <Stepper
        label="Voltage"
        unit="kV"
        value={130}
        values={values}
        allowed={new Set(values)}
        onChange={vi.fn()}
      />,
    );
    expect(screen.getByRole('button', { name: 'Voltage one step down' })).toBeDisabled();
  });
});
