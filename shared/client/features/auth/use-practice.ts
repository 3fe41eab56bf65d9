import { queryOptions } from '@tanstack/react-query';
import { paths, practiceSchema } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { STALE_MS } from '@/shared/client/api/query-client';

/** The practice's name, whether its data are invented, and whether its first administrator is still to come. */
export const practiceQuery = () =>
  queryOptions({
    queryKey: ['practice'],
    queryFn: ({ signal }) => call(paths.practice(), practiceSchema, { signal }),
    staleTime: STALE_MS.reference,
  });
