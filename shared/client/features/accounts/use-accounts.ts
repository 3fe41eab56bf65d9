import { queryOptions } from '@tanstack/react-query';
import { accountPageSchema, auditPageSchema, outboxPageSchema, paths } from '@/shared/contract';
import { call } from '@/shared/client/api/client';

export const accountsQuery = () =>
  queryOptions({
    queryKey: ['accounts'],
    queryFn: ({ signal }) => call(`${paths.accounts()}?limit=200`, accountPageSchema, { signal }),
  });

export const outboxQuery = (after?: string) =>
  queryOptions({
    queryKey: ['outbox', after],
    queryFn: ({ signal }) =>
      call(`${paths.outbox()}${after ? `?after=${encodeURIComponent(after)}` : ''}`, outboxPageSchema, {
        signal,
      }),
    staleTime: 0,
  });

/** `filter` is a query string without `?`: noun, patientId, actorId, after. */
export const auditQuery = (filter: string) =>
  queryOptions({
    queryKey: ['audit', filter],
    queryFn: ({ signal }) => call(`${paths.audit()}?${filter}`, auditPageSchema, { signal }),
    staleTime: 0,
  });
