import { queryOptions } from '@tanstack/react-query';
import { lensDetailSchema, lensSchema, pageOf, paths } from '@/shared/contract';
import { call } from '@/shared/client/api/client';

const lensPageSchema = pageOf(lensSchema);

export const lensesQuery = () =>
  queryOptions({
    queryKey: ['lenses'],
    queryFn: ({ signal }) => call(`${paths.lenses()}?limit=200`, lensPageSchema, { signal }),
  });

export const lensQuery = (id: string) =>
  queryOptions({
    queryKey: ['lenses', id],
    queryFn: ({ signal }) => call(paths.lens(id), lensDetailSchema, { signal }),
  });
