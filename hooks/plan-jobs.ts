import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { cancelPlanJob, getPlanJob, startPlan, startWhatIf } from '#shared/contracts/plan-jobs.ts';
import type { startPlanSchema, startWhatIfSchema } from '#shared/contracts/plan-jobs-schema.ts';
import type { CallInput } from '#shared/contracts/endpoint.ts';
import { call } from './api.ts';

/** The server keeps each question waiting for a moment, so that asking again at once is no hurry. */
const ASK_AGAIN_MILLISECONDS = 150;

function planJobQuery(jobId: string | undefined) {
  return queryOptions({
    queryKey: ['plan-job', jobId],
    queryFn: ({ signal }) => call(getPlanJob, { params: { jobId: jobId ?? '' }, signal }),
    enabled: jobId !== undefined,
    staleTime: Infinity,
    refetchInterval: ({ state }) => (state.data?.state === 'working' ? ASK_AGAIN_MILLISECONDS : false),
  });
}

/** One plan or what-if that is worked out: started, followed while it runs, cancelled. */
function useJob<Input>(send: (input: Input) => Promise<{ jobId: string }>) {
  const client = useQueryClient();
  const [jobId, setJobId] = useState<string>();
  const job = useQuery(planJobQuery(jobId));
  const start = useMutation({ mutationFn: send, onSuccess: (started) => setJobId(started.jobId) });
  const cancel = useMutation({
    mutationFn: (id: string) => call(cancelPlanJob, { params: { jobId: id } }),
    onSuccess: (ended) => client.setQueryData(planJobQuery(ended.id).queryKey, ended),
  });
  const state = job.data?.state;
  useEffect(() => {
    // What was kept moves the plan, the rails and today's list; the job itself stays as it ended.
    if (state !== 'done') return;
    const isOther = (key: unknown) => key !== 'me' && key !== 'plan-job';
    void client.invalidateQueries({ predicate: ({ queryKey }) => isOther(queryKey[0]) });
  }, [client, state, jobId]);
  const isLost = job.error !== null;
  return {
    start: (input: Input) => {
      cancel.reset();
      start.mutate(input);
    },
    cancel: () => jobId && cancel.mutate(jobId),
    job: jobId === undefined ? undefined : job.data,
    isWorking: start.isPending || (jobId !== undefined && !isLost && (state === undefined || state === 'working')),
    error: start.error ?? job.error ?? cancel.error,
  };
}

export function usePlan() {
  return useJob((input: CallInput<typeof startPlanSchema>) => call(startPlan, input));
}

export function useWhatIf() {
  return useJob((input: CallInput<typeof startWhatIfSchema>) => call(startWhatIf, input));
}
