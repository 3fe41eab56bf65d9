import { fireEvent, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { parseDecimal } from '@/shared/contract';
import { Checkbox, RadioGroup } from '@/shared/client/components/choices';
import { DateField } from '@/shared/client/components/date-field';
import { DecimalField, TextField } from '@/shared/client/components/field';
import { FormErrors } from '@/shared/client/components/form-error-summary';
import { Select } from '@/shared/client/components/select';

function LengthField({ error }: { error?: string }) {
  const [text, setText] = useState('');
  return (
    <DecimalField
      label="Axial length"
      unit="mm"
      hint="As the device gives it"
      error={error}
      value={text}
      onChange={setText}
      isRequired
    />
  );
}

describe('a field for a number', () => {
  const field = () => screen.getByRole('textbox', { name: 'Axial length (mm)' });

  it('is named with its unit and opens the decimal keyboard', () => {
    render(<LengthField />);

    expect(field()).toHaveAttribute('inputmode', 'decimal');
    expect(field()).toBeRequired();
  });

  it.each([
    ['23,45', 23.45],
    ['23.45', 23.45],
    ['-0,5', -0.5],
    ['', undefined],
    ['1.234,5', null],
    ['abc', null],
  ])('keeps "%s" as it was typed, read as %p', async (typed, value) => {
    const user = userEvent.setup();
    render(<LengthField />);

    if (typed) await user.type(field(), typed);
    await user.tab();

    expect(field()).toHaveValue(typed);
    expect(parseDecimal(typed)).toBe(value);
  });

  it('is not changed by the wheel or the arrow keys', async () => {
    const user = userEvent.setup();
    render(<LengthField />);
    await user.type(field(), '23.45');

    fireEvent.wheel(field(), { deltaY: 100 });
    await user.keyboard('{ArrowUp}{ArrowDown}');

    expect(field()).toHaveValue('23.45');
  });

  it('is described by its hint and its error', () => {
    render(<LengthField error="Axial length is missing" />);

    expect(field()).toBeInvalid();
    expect(field()).toHaveAccessibleDescription('As the device gives it ▪ Axial length is missing');
  });

  it('takes the focus when its label is pressed', async () => {
    const user = userEvent.setup();
    render(<LengthField />);

    await user.click(screen.getByText('Axial length'));

    expect(field()).toHaveFocus();
  });
});

it('hides a password and lets the browser fill it in', () => {
  render(
    <TextField
      label="Password"
      type="password"
      autoComplete="current-password"
      value=""
      onChange={jest.fn()}
    />,
  );

  const field = screen.getByLabelText('Password');

  expect(field).toHaveAttribute('type', 'password');
  expect(field).toHaveAttribute('autocomplete', 'current-password');
});

describe('a field for a date', () => {
  it('is the date control of the browser and gives an ISO date', () => {
    const onChange = jest.fn();
    render(<DateField label="Birth date" value="" onChange={onChange} max="2026-12-01" />);

    const field = screen.getByLabelText('Birth date');
    fireEvent.change(field, { target: { value: '1950-01-31' } });

    expect(field).toHaveAttribute('type', 'date');
    expect(onChange).toHaveBeenCalledWith('1950-01-31');
  });

  it('takes the focus when its label is pressed', async () => {
    const user = userEvent.setup();
    render(<DateField label="Birth date" value="" onChange={jest.fn()} />);

    await user.click(screen.getByText('Birth date'));

    expect(screen.getByLabelText('Birth date')).toHaveFocus();
  });
});

const SIDES = [
  { value: 'right', label: 'Right eye' },
  { value: 'left', label: 'Left eye' },
] as const;
type Side = (typeof SIDES)[number]['value'];

function SideChoice({ isDisabled }: { isDisabled?: boolean }) {
  const [side, setSide] = useState<Side | null>(null);
  return <RadioGroup label="Side" options={SIDES} value={side} onChange={setSide} isDisabled={isDisabled} />;
}

describe('a choice of few', () => {
  const radio = (name: string) => screen.getByRole('radio', { name });

  it('begins with nothing chosen: a side is never guessed', () => {
    render(<SideChoice />);

    expect(screen.getByRole('radiogroup', { name: 'Side' })).toBeInTheDocument();
    expect(radio('Right eye')).not.toBeChecked();
    expect(radio('Left eye')).not.toBeChecked();
  });

  it('is one stop of the Tab key; arrows move and choose, round the end', async () => {
    const user = userEvent.setup();
    render(<SideChoice />);

    await user.tab();
    expect(radio('Right eye')).toHaveFocus();
    await user.keyboard('{ArrowRight}');
    expect(radio('Left eye')).toBeChecked();
    expect(radio('Left eye')).toHaveFocus();
    await user.keyboard('{ArrowDown}');
    expect(radio('Right eye')).toBeChecked();
    await user.tab();
    expect(document.body).toHaveFocus();
  });

  it('is chosen by a press', async () => {
    const user = userEvent.setup();
    render(<SideChoice />);

    await user.click(radio('Left eye'));

    expect(radio('Left eye')).toBeChecked();
  });

  it.each([' ', '{Enter}'])('is chosen by the key "%s"', async (key) => {
    const user = userEvent.setup();
    render(<SideChoice />);

    await user.tab();
    await user.keyboard(key);

    expect(radio('Right eye')).toBeChecked();
  });

  it('does nothing while it is disabled', () => {
    render(<SideChoice isDisabled />);

    fireEvent.click(radio('Left eye'));
    fireEvent.keyDown(radio('Left eye'), { key: ' ' });
    fireEvent.keyDown(radio('Left eye'), { key: 'ArrowRight' });

    expect(radio('Left eye')).not.toBeChecked();
    expect(radio('Right eye')).not.toBeChecked();
    expect(radio('Right eye')).toHaveAttribute('tabindex', '-1');
  });
});

it('a select hands over the chosen value and is reached by its label', async () => {
  const user = userEvent.setup();
  const onChange = jest.fn();
  render(<Select label="Side" options={SIDES} value="right" onChange={onChange} />);

  await user.click(screen.getByText('Side'));
  expect(screen.getByRole('combobox', { name: 'Side' })).toHaveFocus();
  await user.selectOptions(screen.getByRole('combobox', { name: 'Side' }), 'Left eye');

  expect(onChange).toHaveBeenCalledWith('left');
});

it.each(['press', 'space', 'Enter'])('a checkbox is turned once by %s', async (how) => {
  const user = userEvent.setup();
  const onChange = jest.fn();
  render(<Checkbox label="Toric" isChecked={false} onChange={onChange} />);

  if (how === 'press') await user.click(screen.getByRole('checkbox', { name: 'Toric' }));
  else {
    await user.tab();
    await user.keyboard(how === 'space' ? ' ' : '{Enter}');
  }

  expect(onChange.mock.calls).toEqual([[true]]);
});

it('the summary of a form says once what is wrong', () => {
  render(<FormErrors messages={['Side is missing', 'Axial length is missing']} />);

  const alert = screen.getByRole('alert');

  expect(alert).toHaveTextContent('2 things need correcting');
  expect(alert).toHaveTextContent('Axial length is missing');
});
