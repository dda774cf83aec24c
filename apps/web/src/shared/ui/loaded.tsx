import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { ProblemNotice } from './problem-notice';
import { Skeleton } from './skeleton';

interface LoadedProps<T> {
  query: UseQueryResult<T>;
  /** What the person would have seen, for the failure's sentence: "The lots could not be loaded." */
  failure?: string;
  skeleton?: ReactNode;
  isEmpty?: (data: T) => boolean;
  empty?: ReactNode;
  children: (data: T) => ReactNode;
}

/** The four states of a view: loading, error, empty, data. Data that is there stays while it is asked for again. */
export function Loaded<T>({ query, failure, skeleton, isEmpty, empty, children }: LoadedProps<T>) {
  if (query.data !== undefined) return isEmpty?.(query.data) === true ? empty : children(query.data);
  if (query.isError) {
    return <ProblemNotice problem={query.error} what={failure} onRetry={() => void query.refetch()} />;
  }
  return skeleton ?? <Skeleton />;
}
