import { screen, within } from '@testing-library/react';
import type { Home } from '@/shared/contract';
import { sessionStarted } from '@/shared/client/api/session-store';
import { HomeScreen } from '@/shared/client/features/home/home-screen';
import { problem, startFakeServer } from '@/tests/support/fake-server';
import type { FakeServer } from '@/tests/support/fake-server';
import { aSession } from '@/tests/support/sessions';
import { renderWithQueries } from '@/tests/support/with-queries';

jest.mock('expo-router/head', () => ({ __esModule: true, default: () => null }));
jest.mock('expo-router', () => ({
  ...jest.requireActual<object>('expo-router'),
  useFocusEffect: () => undefined,
}));

const SECTIONS: Home['sections'] = [
  {
    id: 'stops',
    title: 'Stops to settle',
    emptyHint: 'Nothing is stopped.',
    total: 7,
    items: [
      {
        title: 'Quill, Ada',
        detail: 'Axial length differs between the eyes',
        href: '/patients/11111111-1111-4111-8111-111111111111/right',
        side: 'right',
      },
    ],
  },
  {
    id: 'imports',
    title: 'Files not stored yet',
    emptyHint: 'Upload biometry under Imports.',
    total: 0,
    items: [],
  },
];

let server: FakeServer;
beforeEach(() => {
  server = startFakeServer();
  sessionStarted(aSession());
});

it('shows what waits, whose eye it is, and how much more there is', async () => {
  server.on('GET /api/home', { json: { sections: SECTIONS } });
  renderWithQueries(<HomeScreen />);

  const section = await screen.findByRole('region', { name: 'Stops to settle' });
  const link = within(section).getByRole('link');

  expect(link).toHaveAttribute('href', '/patients/11111111-1111-4111-8111-111111111111/right');
  expect(link).toHaveTextContent('Quill, AdaRight eyeAxial length differs between the eyes');
  expect(section).toHaveTextContent('and 6 more');
});

it('says how an empty section is filled', async () => {
  server.on('GET /api/home', { json: { sections: SECTIONS } });
  renderWithQueries(<HomeScreen />);

  const section = await screen.findByRole('region', { name: 'Files not stored yet' });

  expect(section).toHaveTextContent('Upload biometry under Imports.');
  expect(within(section).queryByRole('list')).not.toBeInTheDocument();
});

it('is not blank for a role that nothing waits for', async () => {
  server.on('GET /api/home', { json: { sections: [] } });
  renderWithQueries(<HomeScreen />);

  expect(await screen.findByRole('region', { name: 'Nothing waits for you' })).toBeInTheDocument();
});

it('says what failed and offers another try', async () => {
  server.on('GET /api/home', problem('forbidden', 403, { instance: 'request-4' }));
  renderWithQueries(<HomeScreen />);

  expect(await screen.findByRole('alert')).toHaveTextContent('Title of forbidden');
  expect(screen.getByRole('alert')).toHaveTextContent('request-4');
  expect(screen.getByRole('button', { name: 'Try again' })).toBeInTheDocument();
});
