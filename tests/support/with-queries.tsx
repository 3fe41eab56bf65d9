/** What a screen needs around it: the query client of the page, with nothing left from the test before. */
import { QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import type { ReactElement } from 'react';
import { queryClient } from '@/shared/client/api/query-client';

export function renderWithQueries(element: ReactElement) {
  queryClient.clear();
  return render(<QueryClientProvider client={queryClient}>{element}</QueryClientProvider>);
}
