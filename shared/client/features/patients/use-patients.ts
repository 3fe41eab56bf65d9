import { queryOptions } from '@tanstack/react-query';
import { eyeDeskSchema, pageOf, paths, patientDetailSchema, patientListItemSchema } from '@/shared/contract';
import type { Side } from '@/shared/contract';
import { call } from '@/shared/client/api/client';

const patientPageSchema = pageOf(patientListItemSchema);

export const patientsQuery = (query: string) =>
  queryOptions({
    queryKey: ['patients', 'list', query],
    queryFn: ({ signal }) => call(`${paths.patients()}?${query}`, patientPageSchema, { signal }),
  });

export const patientQuery = (id: string) =>
  queryOptions({
    queryKey: ['patients', id],
    queryFn: ({ signal }) => call(paths.patient(id), patientDetailSchema, { signal }),
  });

export const eyeQuery = (patientId: string, side: Side) =>
  queryOptions({
    queryKey: ['eyes', patientId, side],
    queryFn: ({ signal }) => call(paths.eye(patientId, side), eyeDeskSchema, { signal }),
    staleTime: 0,
  });
