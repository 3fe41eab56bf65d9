import { render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { Href } from 'expo-router';
import { problem, startFakeServer } from '@/tests/support/fake-server';
import type { FakeServer } from '@/tests/support/fake-server';
import { aSession } from '@/tests/support/sessions';
import type * as gateModule from '@/shared/client/features/shell/signed-in-layout';
import type * as storeModule from '@/shared/client/api/session-store';

const mockRedirect = jest.fn();
jest.mock('expo-router', () => ({
  Redirect: ({ href }: { href: Href }) => {
    mockRedirect(href);
    return null;
  },
  Stack: () => 'the screen behind the gate',
}));
jest.mock('@/shared/client/features/shell/shell', () => ({
  Shell: ({ children }: { children: React.ReactNode }) => children,
}));
jest.mock('@/shared/client/features/shell/idle-guard', () => ({ IdleGuard: () => null }));

const REFRESH = 'POST /api/auth/refresh';
let server: FakeServer;
let store: typeof storeModule;
let Gate: typeof gateModule.SignedInLayout;

beforeEach(() => {
  mockRedirect.mockClear();
  server = startFakeServer();
  store = jest.requireActual<typeof storeModule>('@/shared/client/api/session-store');
  Gate = jest.requireActual<typeof gateModule>(
    '@/shared/client/features/shell/signed-in-layout',
  ).SignedInLayout;
  globalThis.history.pushState({}, '', '/patients/7/right?plan=2');
});

// The session is a module's state and begins unknown once: this comes first.
describe('before it is known who is there', () => {
  it('waits, says so when the server does not answer, and tries again', async () => {
    const user = userEvent.setup();
    server.on(REFRESH, problem('unavailable', 503));
    render(<Gate />);

    expect(screen.getByRole('status', { name: 'Looking who is there' })).toBeInTheDocument();
    expect(await screen.findByRole('alert')).toHaveTextContent('Title of unavailable');
    expect(mockRedirect).not.toHaveBeenCalled();

    server.on(REFRESH, { json: aSession() });
    await user.click(screen.getByRole('button', { name: 'Try again' }));

    expect(await screen.findByText('the screen behind the gate')).toBeInTheDocument();
  });
});

describe('a stranger', () => {
  it.each([
    ['absent', { next: '/patients/7/right?plan=2' }],
    ['idle', { next: '/patients/7/right?plan=2', idle: '1' }],
    ['left', {}],
  ] as const)('whose session is %s goes to sign-in with %p', async (why, params) => {
    store.sessionStarted(aSession());
    store.sessionEnded(why);

    render(<Gate />);

    await waitFor(() => expect(mockRedirect).toHaveBeenCalledWith({ pathname: '/sign-in', params }));
    expect(screen.queryByText('the screen behind the gate')).not.toBeInTheDocument();
  });
});
