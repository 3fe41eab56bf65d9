import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { ApiProblem } from '@/shared/client/api/problem';
import { Mark } from '@/shared/client/components/mark';
import { PatientStrip } from '@/shared/client/components/patient-strip';
import { EmptyState, ErrorPanel, Loading, ProgressBar } from '@/shared/client/components/states';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { Quantity, Text } from '@/shared/client/components/text';
import { setWindowWidth } from '@/tests/support/window-width';

interface Measured {
  id: string;
  name: string;
  axialLength: string;
}
const COLUMNS: Column<Measured>[] = [
  { key: 'name', title: 'Patient', render: ({ name }) => name },
  { key: 'length', title: 'Axial length (mm)', isNumber: true, render: ({ axialLength }) => axialLength },
];
const ITEMS: Measured[] = [
  { id: '1', name: 'Quill, Ada', axialLength: '23.45' },
  { id: '2', name: 'Ferry, Bo', axialLength: '—' },
];
const table = (
  <DataTable
    label="Measured eyes"
    columns={COLUMNS}
    items={ITEMS}
    keyOf={({ id }) => id}
    linkOf={({ name }) => ({ href: '/home', label: name })}
  />
);

describe('a table', () => {
  it('is a table with headers on a desk, and its rows open by a real link', () => {
    setWindowWidth(1440);
    render(table);

    const grid = screen.getByRole('table', { name: 'Measured eyes' });
    const rows = within(grid).getAllByRole('row');

    expect(
      within(grid)
        .getAllByRole('columnheader')
        .map((header) => header.textContent),
    ).toEqual(['Patient', 'Axial length (mm)']);
    expect(rows).toHaveLength(3);
    expect(within(rows[1] as HTMLElement).getByRole('link', { name: 'Quill, Ada' })).toHaveAttribute(
      'href',
      '/home',
    );
    expect(within(rows[2] as HTMLElement).getAllByRole('cell')[1]).toHaveTextContent('—');
  });

  it('is a list of labels and values on a phone', () => {
    setWindowWidth(390);
    render(table);

    const [first] = within(screen.getByRole('list', { name: 'Measured eyes' })).getAllByRole('listitem');

    expect(screen.queryByRole('table')).not.toBeInTheDocument();
    expect(first).toHaveTextContent('Quill, Ada');
    expect(first).toHaveTextContent('Axial length (mm)23.45');
  });
});

const failure = new ApiProblem({
  code: 'unavailable',
  status: 503,
  title: 'The service is not ready',
  detail: 'Try again in a minute.',
  requestId: 'request-7',
});

describe('the states of a screen', () => {
  it('failed: what happened, what was kept, what to do, what to quote', async () => {
    const user = userEvent.setup();
    const onRetry = jest.fn();
    render(<ErrorPanel problem={failure} onRetry={onRetry} kept="What you typed is still here." />);

    expect(screen.getByRole('alert')).toHaveTextContent(
      'The service is not readyTry again in a minute.What you typed is still here.When you ask for help, quote request-7',
    );
    await user.click(screen.getByRole('button', { name: 'Try again' }));
    expect(onRetry).toHaveBeenCalledTimes(1);
  });

  it('loading: busy, and says with what', () => {
    render(<Loading label="Loading patients" />);

    expect(screen.getByRole('status', { name: 'Loading patients' })).toHaveAttribute('aria-busy', 'true');
  });

  it('empty: what to do next', () => {
    render(<EmptyState title="No patients yet" hint="Register one, or import a file." />);

    expect(screen.getByRole('region', { name: 'No patients yet' })).toHaveTextContent('Register one');
  });

  it('under way: counts, not only a bar', () => {
    render(<ProgressBar label="Checked rows" done={1250} total={50000} />);

    expect(screen.getByText('Checked rows: 1,250 of 50,000')).toBeInTheDocument();
    expect(screen.getByRole('progressbar', { name: 'Checked rows' })).toHaveAttribute(
      'aria-valuenow',
      '1250',
    );
  });
});

describe('whose eye it is', () => {
  const patient = {
    id: '11111111-1111-4111-8111-111111111111',
    familyName: 'Quill',
    givenName: 'Ada',
    birthDate: '1950-01-31',
    recordNumber: 'L-0007',
    isDemo: true,
  };

  it('stands in words: name, birth date, record number, side, and that the person is invented', () => {
    render(<PatientStrip patient={patient} side="right" />);

    const strip = screen.getByRole('region', { name: 'Patient' });

    for (const words of ['Quill, Ada', '31 Jan 1950', 'L-0007', 'RIGHT EYE', 'invented'])
      expect(strip).toHaveTextContent(words);
    expect(strip).not.toHaveTextContent('LEFT EYE');
  });

  it('names no side where none is meant', () => {
    render(<PatientStrip patient={{ ...patient, isDemo: false }} />);

    const strip = screen.getByRole('region', { name: 'Patient' });

    expect(strip).not.toHaveTextContent(/eye|invented/i);
  });
});

it.each([
  ['stop', 'Stop'],
  ['weigh', 'Weigh'],
  ['note', 'Note'],
] as const)('the severity %s is a word and a shape', (tone, word) => {
  const { container } = render(<Mark tone={tone} />);

  expect(screen.getByText(word)).toBeInTheDocument();
  expect(container.querySelector('svg > *')).not.toBeNull();
});

it('headings have their level, and numbers their unit beside them', () => {
  render(
    <>
      <Text level={2}>Right eye</Text>
      <Quantity value="23.45" unit="mm" />
      <Quantity value="—" unit="D" />
    </>,
  );

  expect(screen.getByRole('heading', { level: 2, name: 'Right eye' })).toBeInTheDocument();
  expect(screen.getByText('mm')).toBeInTheDocument();
  expect(screen.queryByText('D')).not.toBeInTheDocument();
});
