import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { Account } from '@/shared/contract';
import { AccountForm } from '@/shared/client/features/accounts/account-form';
import { problem, startFakeServer } from '@/tests/support/fake-server';
import type { FakeServer } from '@/tests/support/fake-server';
import { renderWithQueries } from '@/tests/support/with-queries';

const ACCOUNT: Account = {
  id: '11111111-1111-4111-8111-111111111111',
  email: 'ada@practice.example',
  displayName: 'Ada Quill',
  roles: ['technician'],
  status: 'active',
  lastSignInAt: null,
  version: 3,
};
const PUT = `PUT /api/accounts/${ACCOUNT.id}`;

let server: FakeServer;
beforeEach(() => {
  server = startFakeServer();
});

const nameField = () => screen.getByRole('textbox', { name: 'Name' });
const press = (name: string) => userEvent.click(screen.getByRole('button', { name }));

async function retype(text: string) {
  await userEvent.clear(nameField());
  if (text) await userEvent.type(nameField(), text);
}

it('saves against the version that was shown, and says so', async () => {
  server.on(PUT, ({ body }) => ({ json: { ...ACCOUNT, ...(body as object), version: 4 } }));
  renderWithQueries(<AccountForm account={ACCOUNT} />);

  await retype('Ada Ferry');
  await userEvent.click(screen.getByRole('checkbox', { name: 'Surgeon' }));
  await press('Save');

  expect(await screen.findByText('Saved')).toBeInTheDocument();
  expect(server.asked[0]).toMatchObject({
    headers: { 'If-Match': '"3"' },
    body: { displayName: 'Ada Ferry', roles: ['technician', 'surgeon'], status: 'active' },
  });
});

it('asks nothing of the server while a value is missing', async () => {
  renderWithQueries(<AccountForm account={ACCOUNT} />);

  await retype('');
  await press('Save');

  expect(screen.getByRole('alert')).toHaveTextContent('Name is missing');
  expect(server.asked).toHaveLength(0);
});

describe('when somebody changed the account meanwhile', () => {
  const THEIRS: Account = { ...ACCOUNT, displayName: 'Ada Quill-Ferry', version: 9 };

  async function savedTooLate() {
    server.on(PUT, problem('changed-meanwhile', 412, { current: THEIRS }));
    renderWithQueries(<AccountForm account={ACCOUNT} />);
    await retype('Ada Ferry');
    await press('Save');
    return screen.findByRole('alert');
  }

  it('shows what differs, side by side, and keeps what was typed', async () => {
    const alert = await savedTooLate();

    expect(alert).toHaveTextContent('Nothing was saved');
    expect(alert).toHaveTextContent('NameYoursAda FerryStored nowAda Quill-Ferry');
    expect(within(alert).queryByText('Roles')).not.toBeInTheDocument();
    expect(nameField()).toHaveValue('Ada Ferry');
  });

  it('saves over it only when told to, against the version that was compared', async () => {
    await savedTooLate();
    server.on(PUT, ({ body }) => ({ json: { ...THEIRS, ...(body as object), version: 10 } }));

    await press('Save mine over theirs');

    expect(await screen.findByText('Saved')).toBeInTheDocument();
    expect(server.asked[1]).toMatchObject({
      headers: { 'If-Match': '"9"' },
      body: { displayName: 'Ada Ferry' },
    });
  });

  it('takes theirs without asking the server again', async () => {
    await savedTooLate();

    await press('Take theirs');

    expect(nameField()).toHaveValue('Ada Quill-Ferry');
    expect(screen.queryByRole('alert')).not.toBeInTheDocument();
    expect(server.asked).toHaveLength(1);
  });
});

describe('disabling', () => {
  it('names the person and what follows, and waits for a second act', async () => {
    renderWithQueries(<AccountForm account={ACCOUNT} />);

    await press('Disable this account');

    const dialog = screen.getByRole('dialog', { name: 'Disable the account of Ada Quill?' });
    expect(dialog).toHaveTextContent('signed out everywhere at once');
    expect(server.asked).toHaveLength(0);
  });

  it('saves nothing else that was typed', async () => {
    server.on(PUT, { json: { ...ACCOUNT, status: 'disabled', version: 4 } });
    renderWithQueries(<AccountForm account={ACCOUNT} />);
    await retype('Half a na');

    await press('Disable this account');
    await press('Disable');

    expect(await screen.findByRole('button', { name: 'Enable again' })).toBeInTheDocument();
    expect(server.asked[0]?.body).toEqual({
      displayName: 'Ada Quill',
      roles: ['technician'],
      status: 'disabled',
    });
  });
});
