import { queryOptions, useQuery } from '@tanstack/react-query';
import { editCustomerSettings, getCustomerSettings, type CustomerSettings } from '#shared/contracts/customers.ts';
import { listFeedback } from '#shared/contracts/feedback.ts';
import { listWaiting } from '#shared/contracts/waiting-list.ts';
import { call } from './api.ts';
import { STALE } from './query-client.ts';
import { useFarmMutation } from './use-farm-mutation.ts';

function customersQuery() {
  return queryOptions({
    queryKey: ['customers'],
    queryFn: async ({ signal }) => {
      const [settings, feedback, waiting] = await Promise.all([
        call(getCustomerSettings, { signal }),
        call(listFeedback, { signal }),
        call(listWaiting, { signal }),
      ]);
      return { settings, feedback, waiting: waiting.boxes };
    },
    staleTime: STALE.office,
  });
}

/** What customers said, who waits for what, and how the farm keeps in touch. */
export function useCustomers() {
  return useQuery(customersQuery());
}

export function useEditCustomerSettings() {
  return useFarmMutation((body: CustomerSettings) => call(editCustomerSettings, { body }));
}
