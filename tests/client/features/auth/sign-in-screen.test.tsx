import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { Practice } from '@/shared/contract';
import { getSession, sessionEnded, sessionStarted } from '@/shared/client/api/session-store';
import { SignInScreen } from '@/shared/client/features/auth/sign-in-screen';
import { problem, startFakeServer } from '@/tests/support/fake-server';
import type { FakeServer } from '@/tests/support/fake-server';
import { aSession } from '@/tests/support/sessions';
import { renderWithQueries } from '@/tests/support/with-queries';

const mockRedirect = jest.fn();
let mockParams: Record<string, string> = {};
jest.mock('expo-router/head', () => ({ __esModule: true, default: () => null }));
jest.mock('expo-router', () => ({
  ...jest.requireActual<object>('expo-router'),
  useFocusEffect: () => undefined,
  useLocalSearchParams: () => mockParams,
  Redirect: ({ href }: { href: unknown }) => {
    mockRedirect(href);
    return null;
  },
}));

const SIGN_IN = 'POST /api/auth/sign-in';
const PRACTICE: Practice = {
  name: 'Harbour practice',
  isDemo: true,
  needsFirstAdministrator: false,
  demoAccounts: [
    {
      email: 'surgeon@practice.example',
      password: 'steady hand at the harbour',
      displayName: 'Bo Ferry (demo)',
      roles: ['surgeon'],
    },
  ],
};

let server: FakeServer;
beforeEach(() => {
  mockRedirect.mockClear();
  mockParams = {};
  sessionEnded();
  server = startFakeServer();
  server.on('GET /api/practice', { json: PRACTICE });
  server.on(SIGN_IN, { json: aSession() });
});

async function signInAs(email: string, password: string) {
  await userEvent.type(screen.getByRole('textbox', { name: 'E-mail' }), email);
  await userEvent.type(screen.getByLabelText('Password'), `${password}{Enter}`);
}

it('keeps what was typed when it does not match, and says so', async () => {
  server.on(SIGN_IN, problem('wrong-credentials', 401));
  renderWithQueries(<SignInScreen />);

  await signInAs('ada@practice.example', 'wrong words');

  expect(await screen.findByRole('alert')).toHaveTextContent('Title of wrong-credentials');
  expect(screen.getByRole('textbox', { name: 'E-mail' })).toHaveValue('ada@practice.example');
  expect(getSession().status).toBe('out');
});

it('lists no demonstration account where there is none', async () => {
  server.on('GET /api/practice', { json: { ...PRACTICE, isDemo: false, demoAccounts: [] } });
  renderWithQueries(<SignInScreen />);

  expect(await screen.findByText('Harbour practice')).toBeInTheDocument();
  expect(screen.queryByText('Try it as')).not.toBeInTheDocument();
  expect(screen.queryByText(/Demonstration/)).not.toBeInTheDocument();
});

it('leads an empty practice to its set-up', async () => {
  server.on('GET /api/practice', { json: { ...PRACTICE, needsFirstAdministrator: true } });
  renderWithQueries(<SignInScreen />);

  await waitFor(() => expect(mockRedirect).toHaveBeenCalledWith('/setup'));
});

it('says why the session ended', async () => {
  mockParams = { idle: '1' };
  renderWithQueries(<SignInScreen />);

  expect(await screen.findByText(/signed out after 15 quiet minutes/)).toBeInTheDocument();
});

it('lets a visitor of the demonstration in by one press', async () => {
  renderWithQueries(<SignInScreen />);

  await userEvent.click(await screen.findByRole('button', { name: 'Enter as Bo Ferry (demo), Surgeon' }));

  expect(server.asked.find(({ path }) => path === '/api/auth/sign-in')?.body).toEqual({
    email: 'surgeon@practice.example',
    password: 'steady hand at the harbour',
  });
  expect(mockRedirect).toHaveBeenCalledWith('/home');
});

it('leads back to where the person wanted to go', async () => {
  mockParams = { next: '/patients/7/right?plan=2' };
  sessionStarted(aSession());
  renderWithQueries(<SignInScreen />);

  expect(mockRedirect).toHaveBeenCalledWith('/patients/7/right?plan=2');
});
