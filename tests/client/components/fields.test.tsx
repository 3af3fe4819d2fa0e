import { fireEvent, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useForm, useWatch } from 'react-hook-form';
import { describe, expect, it, vi } from 'vitest';
import { DateTimeField, inWords } from '@/components/ui/date-time-field';
import { NumberField } from '@/components/ui/number-field';
import { Segmented } from '@/components/ui/segmented';
import { SelectField } from '@/components/ui/select-field';
import { TextField } from '@/components/ui/text-field';

const FRACTIONS = [
  { value: '1', label: '100%', consequence: '1320 mL' },
  { value: '0.8', label: '80%', consequence: '1056 mL' },
  { value: '0.5', label: '50%', consequence: '660 mL' },
];

describe('a field', () => {
  it('ties its error, caution and hint to the control', () => {
    render(
      <NumberField
        label="Rate"
        unit="mL/h"
        error="Type the rate, in mL/h."
        caution="Weigh again."
        hint="In mL/h."
      />,
    );
    const input = screen.getByLabelText('Rate');
    expect(input).toBeInvalid();
    expect(input).toHaveAccessibleDescription('Type the rate, in mL/h. Weigh again. In mL/h.');
    expect(screen.getByRole('alert')).toHaveTextContent('Type the rate, in mL/h.');
  });

  it('claims nothing when nothing is wrong', () => {
    render(<TextField label="Where" />);
    const input = screen.getByLabelText('Where');
    expect(input).toBeValid();
    expect(input).not.toHaveAttribute('aria-describedby');
  });

  it('keeps a hidden label for those who need it', () => {
    render(
      <SelectField label="Fluid" labelHidden options={[{ value: 'a', label: 'Sodium chloride 0.9%' }]} />,
    );
    expect(screen.getByRole('combobox', { name: 'Fluid' })).toBeInTheDocument();
  });
});

describe('a number field', () => {
  it('keeps what is typed and ignores the arrow keys and the wheel', async () => {
    render(<NumberField label="Rate" />);
    const input = screen.getByLabelText('Rate');
    await userEvent.type(input, '5,2x{ArrowUp}{ArrowDown}');
    fireEvent.wheel(input, { deltaY: 100 });
    expect(input).toHaveValue('5,2x');
  });

  it('refuses paste where a figure must be one’s own, and says why', async () => {
    render(<NumberField label="Rate" ownHand />);
    const input = screen.getByLabelText('Rate');
    await userEvent.click(input);
    await userEvent.paste('44');
    expect(input).toHaveValue('');
    expect(input).toHaveAccessibleDescription(/pasting is shut/);
    await userEvent.type(input, '44');
    expect(input).toHaveValue('44');
  });

  it('lets paste through elsewhere', async () => {
    render(<NumberField label="Rate" />);
    await userEvent.click(screen.getByLabelText('Rate'));
    await userEvent.paste('44');
    expect(screen.getByLabelText('Rate')).toHaveValue('44');
  });
});

describe('a strip of choices', () => {
  it('is one tab stop, and arrows choose', async () => {
    const onChoose = vi.fn();
    render(
      <>
        <Segmented label="Fraction" options={FRACTIONS} defaultValue="1" onChoose={onChoose} />
        <button type="button">After</button>
      </>,
    );
    await userEvent.tab();
    expect(screen.getByRole('radio', { name: /100%/ })).toHaveFocus();
    await userEvent.keyboard('{ArrowRight}');
    expect(screen.getByRole('radio', { name: /80%/ })).toBeChecked();
    expect(onChoose).toHaveBeenLastCalledWith('0.8');
    await userEvent.tab();
    expect(screen.getByRole('button', { name: 'After' })).toHaveFocus();
  });

  it('names its group, each choice and its consequence', () => {
    render(<Segmented label="Fraction" options={FRACTIONS} error="Choose one." />);
    const group = screen.getByRole('radiogroup', { name: 'Fraction' });
    expect(group).toHaveAccessibleDescription('Choose one.');
    expect(screen.getByRole('radio', { name: '80% 1056 mL' })).not.toBeChecked();
  });

  it('follows the value it is given', () => {
    render(<Segmented label="Fraction" options={FRACTIONS} value="0.5" onChoose={() => undefined} />);
    expect(screen.getByRole('radio', { name: /50%/ })).toBeChecked();
  });
});

describe('a date and time', () => {
  it.each([
    ['2026-06-10T07:50', false, '10 Jun 2026, 07:50'],
    ['2026-12-01T00:00', true, '1 Dec, 00:00'],
    ['2026-06-10', false, '10 Jun 2026'],
    ['2026-13-10', false, ''],
    ['nonsense', false, ''],
  ])('%s reads "%s"', (value, short, words) => {
    expect(inWords(value, short)).toBe(words);
  });

  it('stands in words beside the browser’s own entry', () => {
    render(<DateTimeField label="Start" value="2026-06-10T12:00" short onChange={() => undefined} />);
    expect(screen.getByLabelText('Start')).toHaveValue('2026-06-10T12:00');
    expect(screen.getByText('10 Jun, 12:00')).toBeInTheDocument();
  });
});

function Form({ onSend }: { onSend: (values: object) => void }) {
  const { register, handleSubmit, control } = useForm({
    defaultValues: { weight: '', fraction: '1', fluid: '', start: '2026-06-10T12:00' },
  });
  const start = useWatch({ control, name: 'start' });
  return (
    <form onSubmit={handleSubmit((values) => onSend(values))}>
      <NumberField label="Weight" {...register('weight')} />
      <Segmented label="Fraction" options={FRACTIONS} {...register('fraction')} />
      <SelectField
        label="Fluid"
        placeholder="Choose"
        options={[{ value: 'a', label: 'A' }]}
        {...register('fluid')}
      />
      <DateTimeField label="Start" {...register('start')} value={start} />
      <button type="submit">Send</button>
    </form>
  );
}

describe('react-hook-form', () => {
  it('registers every kind of field', async () => {
    const onSend = vi.fn();
    render(<Form onSend={onSend} />);
    expect(screen.getByRole('radio', { name: /100%/ })).toBeChecked();
    await userEvent.type(screen.getByLabelText('Weight'), '16.4');
    await userEvent.click(screen.getByRole('radio', { name: /80%/ }));
    await userEvent.selectOptions(screen.getByLabelText('Fluid'), 'a');
    fireEvent.change(screen.getByLabelText('Start'), { target: { value: '2026-06-10T13:30' } });
    await userEvent.click(screen.getByRole('button', { name: 'Send' }));
    expect(onSend).toHaveBeenCalledWith({
      weight: '16.4',
      fraction: '0.8',
      fluid: 'a',
      start: '2026-06-10T13:30',
    });
  });
});
