import { zodResolver } from '@hookform/resolvers/zod';
import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { Button } from '@/components/Button';
import { Checkbox } from '@/components/Checkbox';
import { Field } from '@/components/Field';
import { RadioCards } from '@/components/RadioCards';
import { Segments } from '@/components/Segments';
import { SelectField } from '@/components/SelectField';
import { Stepper } from '@/components/Stepper';
import { nudged } from '@/components/stepValue';
import { TextArea } from '@/components/TextArea';
import { accessibilityProblems } from '@tests/support/accessibility';

const schema = z.object({ mass: z.string().min(1, 'Enter the mass that the balance showed.') });

function MassForm({ onSaved }: { onSaved: (mass: string) => void }) {
  const { register, handleSubmit, formState } = useForm({
    resolver: zodResolver(schema),
    defaultValues: { mass: '' },
  });
  return (
    <form onSubmit={(event) => void handleSubmit(({ mass }) => onSaved(mass))(event)}>
      <Field
        label="Dry feed"
        unit="g"
        hint="balance reads to 0.02 g"
        error={formState.errors.mass}
        {...register('mass')}
      />
      <Button type="submit" variant="primary">
        Record
      </Button>
    </form>
  );
}

describe('Field', () => {
  it('is found by its label and described by its hint', async () => {
    const onSaved = vi.fn();
    render(<MassForm onSaved={onSaved} />);
    const field = screen.getByRole('textbox', { name: 'Dry feed' });
    expect(field).toHaveAccessibleDescription('balance reads to 0.02 g');
    await userEvent.type(field, '300,20');
    await userEvent.click(screen.getByRole('button', { name: 'Record' }));
    expect(onSaved).toHaveBeenCalledWith('300,20');
  });

  it('says what is wrong, and takes the focus there', async () => {
    const onSaved = vi.fn();
    render(<MassForm onSaved={onSaved} />);
    await userEvent.click(screen.getByRole('button', { name: 'Record' }));
    const field = screen.getByRole('textbox', { name: 'Dry feed' });
    expect(field).toBeInvalid();
    expect(field).toHaveAccessibleDescription(/Enter the mass that the balance showed/);
    expect(field).toHaveFocus();
    expect(onSaved).not.toHaveBeenCalled();
  });

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
        <SelectField
          label="Rig"
          placeholder="Pick a rig"
          options={[{ value: '2', label: 'Rig 2' }]}
          error="Pick one."
        />
        <Checkbox label="Cell empty" note="look" error="Tick it." />
      </>,
    );
    expect(await accessibilityProblems(container)).toEqual([]);
  });
});

describe('RadioCards and Segments', () => {
  const options = [
    { value: 'fitted', label: 'Fitted', note: 'every corner' },
    { value: 'drawn', label: 'Drawn in' },
    { value: 'full', label: 'Full', refusal: 'breaks the field limit' },
  ] as const;

  it('picks by keyboard and refuses what cannot be picked', async () => {
    const onPicked = vi.fn();
    const { container } = render(
      <RadioCards legend="Region" options={options} value="fitted" onPicked={onPicked} />,
    );
    await userEvent.tab();
    await userEvent.keyboard('{ArrowDown}');
    expect(onPicked).toHaveBeenCalledWith('drawn');
    expect(screen.getByRole('radio', { name: /Full/ })).toBeDisabled();
    expect(screen.getByText('breaks the field limit')).toBeVisible();
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('switches a view and keeps exactly one on', async () => {
    function Views() {
      const [view, setView] = useState<'map' | 'table'>('map');
      return (
        <Segments
          label="View"
          value={view}
          onPicked={setView}
          options={[
            { value: 'map', label: 'Map' },
            { value: 'table', label: 'Table' },
          ]}
        />
      );
    }
    render(<Views />);
    await userEvent.click(screen.getByRole('radio', { name: 'Table' }));
    expect(screen.getByRole('radio', { name: 'Table' })).toBeChecked();
    expect(screen.getByRole('radio', { name: 'Map' })).not.toBeChecked();
  });
});

describe('Stepper', () => {
  const range = { min: 130, max: 180, step: 5, allowedLow: 140 };

  it('moves one settable step by button and by key', async () => {
    const onStepped = vi.fn();
    const { container } = render(
      <Stepper label="Voltage" unit="kV" value={160} range={range} onStepped={onStepped} />,
    );
    await userEvent.click(screen.getByRole('button', { name: 'Voltage one step up' }));
    screen.getByRole('spinbutton', { name: 'Voltage' }).focus();
    await userEvent.keyboard('{ArrowDown}{PageUp}{Home}');
    expect(onStepped.mock.calls.map(([value]) => value as number)).toEqual([165, 155, 180, 140]);
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('stops at what the envelope still allows', () => {
    render(<Stepper label="Voltage" unit="kV" value={140} range={range} onStepped={vi.fn()} />);
    expect(screen.getByRole('button', { name: 'Voltage one step down' })).toBeDisabled();
    expect(screen.getByRole('spinbutton')).toHaveAttribute('aria-valuetext', '140 kV');
  });

  it('goes from between two steps to the next one, without binary noise', () => {
    expect(nudged(162, 1, range)).toBe(165);
    expect(nudged(162, -1, range)).toBe(160);
    expect(nudged(0.2, 1, { min: 0.1, max: 1, step: 0.1 })).toBe(0.3);
    expect(nudged(180, 1, range)).toBe(180);
  });
});
