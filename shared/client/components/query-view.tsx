/** The states of a read, in one place: waiting, failed, and what came back. Data in hand stay in sight when a refresh fails. */
import type { ReactNode } from 'react';
import { asProblem } from '@/shared/client/api/problem';
import { ErrorPanel, Loading } from './states';

interface QueryViewProps<T> {
  query: { data: T | undefined; error: unknown; isPending: boolean; refetch: () => unknown };
  /** Grey lines while waiting. */
  lines?: number;
  label?: string;
  children: (data: T) => ReactNode;
}

export function QueryView<T>({ query, lines = 6, label, children }: QueryViewProps<T>) {
  return (
    <>
      {query.error ? (
        <ErrorPanel problem={asProblem(query.error)} onRetry={() => void query.refetch()} />
      ) : null}
      {query.isPending && !query.error ? <Loading lines={lines} label={label} /> : null}
      {query.data === undefined ? null : children(query.data)}
    </>
  );
}
