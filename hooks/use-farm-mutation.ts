import { useMutation, useQueryClient } from '@tanstack/react-query';

/**
 * A change in the office or the trade area. One weight moves the cutout, the plan, the packing list and today's list,
 * so whatever is on the screen is fetched again, after a refusal too: the refusal may be news. Settles when it has come.
 */
export function useFarmMutation<Input, Output>(send: (input: Input) => Promise<Output>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSettled: () => client.invalidateQueries({ predicate: (query) => query.queryKey[0] !== 'me' }),
  });
}
