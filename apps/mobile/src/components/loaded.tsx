import type { ReactNode } from 'react';
import type { UseQueryResult } from '@tanstack/react-query';
import { Age } from '@/components/age';
import { ProblemNote } from '@/components/problem-note';
import { Waiting } from '@/components/waiting';

type Props<T> = {
  query: UseQueryResult<T>;
  /** "Reading the lakes…" */
  waiting: string;
  /** Shown in place of the content when it answers true. */
  empty?: { when: (value: T) => boolean; show: ReactNode } | undefined;
  children: (value: T) => ReactNode;
};

/** The four states of anything read: waiting, problem, empty, content. Last known content stays, with its age. */
export function Loaded<T>({ query, waiting, empty, children }: Props<T>) {
  const { data: value, error, isFetching, dataUpdatedAt, refetch } = query;
  if (value === undefined)
    return error ? (
      <ProblemNote problem={error} onRetry={() => void refetch()} />
    ) : (
      <Waiting words={waiting} />
    );
  return (
    <>
      <Age readAtMs={dataUpdatedAt} reading={isFetching} failed={error !== null} />
      {empty?.when(value) ? empty.show : children(value)}
    </>
  );
}
