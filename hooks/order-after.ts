import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { getOrderAgain, type OrderAgain } from '#shared/contracts/account.ts';
import { getFeedback, giveFeedback, type FeedbackEdit } from '#shared/contracts/feedback.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { fillBasket } from './use-basket.ts';

/**
 * Ordering the same again: what can be had goes into the basket at once; when something is missing, that is `news` to be
 * read first, and `take` puts in the rest.
 */
export function useOrderAgain(token: string, onFilled: () => void) {
  const [news, setNews] = useState<OrderAgain>();
  const take = (again: OrderAgain) => {
    setNews(undefined);
    if (!again.dayId) return;
    fillBasket(again.dayId, again.items);
    onFilled();
  };
  const ask = useMutation({
    mutationFn: () => call(getOrderAgain, { params: { token } }),
    onSuccess: (again) => {
      if (again.gone.length + again.fewer.length > 0) setNews(again);
      else take(again);
    },
  });
  return {
    ask: () => ask.mutate(),
    isAsking: ask.isPending,
    error: ask.error?.message,
    news,
    take,
    forget: () => setNews(undefined),
  };
}

function feedbackQuery(token: string) {
  return queryOptions({
    queryKey: ['feedback', token],
    queryFn: ({ signal }) => call(getFeedback, { params: { token }, signal }),
    staleTime: STALE.office,
  });
}

/** What the customer said about an order, and the way to say it; asked for once the order is handed over. */
export function useFeedback(token: string, isHandedOver: boolean) {
  const client = useQueryClient();
  const query = useQuery({ ...feedbackQuery(token), enabled: isHandedOver });
  const give = useMutation({
    mutationFn: (body: FeedbackEdit) => call(giveFeedback, { params: { token }, body }),
    onSuccess: (feedback) => client.setQueryData(feedbackQuery(token).queryKey, feedback),
  });
  return {
    feedback: query.data,
    give: (body: FeedbackEdit) => give.mutate(body),
    isSending: give.isPending,
    isSaved: give.isSuccess,
    error: give.error?.message,
  };
}
