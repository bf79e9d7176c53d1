import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { AppError } from '#shared/errors.ts';
import { Button } from './button.tsx';
import { EmptyState } from './empty-state.tsx';
import { Notice } from './notice.tsx';
import { Skeleton } from './skeleton.tsx';

/** The part of a query's answer that decides what is drawn; a TanStack Query result fits as it is. */
export type Fetched<Data> = {
  data: Data | undefined;
  error: Error | null;
  refetch: () => unknown;
};

type StateViewProps<Data> = {
  query: Fetched<Data>;
  /** What is awaited, as in `the boxes`. */
  what: string;
  /** Stands in while waiting, as large as what will come. */
  waiting?: ReactNode;
  /** For what does not exist (any more). */
  missing?: { title: string; words: string; children?: ReactNode };
  children: (data: Data) => ReactNode;
};

/** The four states of a screen: waiting, failed, missing, ready. Figures already seen stay while fresh ones fail. */
export function StateView<Data>({ query, what, waiting, missing, children }: StateViewProps<Data>) {
  const { data, error } = query;
  if (data !== undefined && !error) return children(data);
  if (error instanceof AppError && error.code === 'NOT_FOUND') {
    return <EmptyState level={1} {...(missing ?? { title: 'Not here', words: `We could not find ${what}.` })} />;
  }
  if (!error) {
    return (
      <View role="status" aria-busy={true} aria-label={`Fetching ${what}`}>
        {waiting ?? <Skeleton />}
      </View>
    );
  }
  return (
    <View style={css('w-stack')}>
      <Notice
        kind="error"
        title={`We could not fetch ${what}.`}
        kept={data === undefined ? sentenceOf(error) : `${sentenceOf(error)} Shown below is what we fetched before.`}
        next="Try again, or come back in a few minutes."
      >
        <Button label="Try again" kind="quiet" small onPress={() => void query.refetch()} />
      </Notice>
      {data === undefined ? null : children(data)}
    </View>
  );
}

/** Our own refusals carry a sentence for people; anything else came from the line between here and the farm. */
function sentenceOf(error: Error): string {
  return error instanceof AppError ? error.message : 'There may be no connection. Nothing was changed.';
}
