import { screen, waitFor } from '@testing-library/react';
import { Text } from '@/shared/client/components/text';
import { DemoFrame } from '@/shared/client/features/shell/demo-frame';
import { startFakeServer } from '@/tests/support/fake-server';
import { renderWithQueries } from '@/tests/support/with-queries';

const PRACTICE = { name: 'Harbour practice', needsFirstAdministrator: false, demoAccounts: [] };
const MARK = 'Demonstration: people and lenses are invented';
const page = (
  <DemoFrame>
    <Text>Any page</Text>
  </DemoFrame>
);

it('marks any page of the demonstration', async () => {
  startFakeServer().on('GET /api/practice', { json: { ...PRACTICE, isDemo: true } });
  renderWithQueries(page);

  expect(await screen.findByText(MARK)).toBeInTheDocument();
  expect(screen.getByText('Any page')).toBeInTheDocument();
});

it('marks no page of a real practice', async () => {
  const server = startFakeServer();
  server.on('GET /api/practice', { json: { ...PRACTICE, isDemo: false } });
  renderWithQueries(page);

  await waitFor(() => expect(server.count('GET /api/practice')).toBe(1));

  expect(screen.queryByText(MARK)).not.toBeInTheDocument();
});
