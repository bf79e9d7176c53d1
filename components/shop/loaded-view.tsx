import type { ReactNode } from 'react';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { StateView, type Fetched } from '#components/ui/state-view.tsx';

type LoadedViewProps<Data> = {
  /** What the page's loader found on the server. */
  loaded: { state: 'ready' | 'missing' | 'failed' };
  query: Fetched<Data>;
  /** What is awaited, as in `the boxes`. */
  what: string;
  waiting: ReactNode;
  missing?: { title: string; words: string; children?: ReactNode };
  children: (data: Data) => ReactNode;
};

/** The four states of a page that was begun on the server; tells the server which status the page has. */
export function LoadedView<Data>({ loaded, query, what, waiting, missing, children }: LoadedViewProps<Data>) {
  const absent = missing ?? { title: 'Not here', words: `We could not find ${what}.` };
  if (loaded.state === 'missing') {
    return (
      <>
        <PageStatus status={404} />
        <EmptyState level={1} {...absent} />
      </>
    );
  }
  return (
    <>
      {loaded.state === 'failed' ? <PageStatus status={503} /> : null}
      <StateView query={query} what={what} waiting={waiting} missing={absent}>
        {children}
      </StateView>
    </>
  );
}

/** The server reads this mark in the finished page and answers with the status. */
export function PageStatus({ status }: { status: 404 | 503 }) {
  return <span hidden data-page-status={status} />;
}
