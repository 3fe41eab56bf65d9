import { queryOptions } from '@tanstack/react-query';
import { importRowPageSchema, importSchema, pageOf, paths } from '@/shared/contract';
import type { BiometryImport, RowOutcome } from '@/shared/contract';
import { call } from '@/shared/client/api/client';

const importPageSchema = pageOf(importSchema);
const POLL_MS = 500;

export const isRunning = ({ status }: Pick<BiometryImport, 'status'>): boolean =>
  status === 'checking' || status === 'storing';

export const importsQuery = (after: string) =>
  queryOptions({
    queryKey: ['imports', 'list', after],
    queryFn: ({ signal }) =>
      call(`${paths.imports()}${after ? `?after=${encodeURIComponent(after)}` : ''}`, importPageSchema, {
        signal,
      }),
    staleTime: 0,
  });

/** Asked again and again while the server checks or stores. */
export const importQuery = (id: string) =>
  queryOptions({
    queryKey: ['imports', id],
    queryFn: ({ signal }) => call(paths.import(id), importSchema, { signal }),
    staleTime: 0,
    refetchInterval: ({ state }) => (state.data && isRunning(state.data) ? POLL_MS : false),
  });

export const importRowsQuery = (
  id: string,
  { outcome, after, status }: { outcome: RowOutcome; after: string; status: string },
) =>
  queryOptions({
    queryKey: ['imports', id, 'rows', outcome, after, status],
    queryFn: ({ signal }) => {
      const query = new URLSearchParams({ outcome, ...(after ? { after } : {}) });
      return call(`${paths.importRows(id)}?${query.toString()}`, importRowPageSchema, { signal });
    },
  });
