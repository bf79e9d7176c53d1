import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { DefinitionList } from '#components/ui/definition-list.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { SmallCaps } from '#components/ui/small-caps.tsx';
import type { PlanJob } from '#shared/contracts/plan-jobs.ts';
import { describeProgress } from './job-words.ts';

type JobPanelProps = {
  job: PlanJob | undefined;
  isWorking: boolean;
  error: Error | null;
  onCancel: () => void;
};

/** How far a plan has come, with a button that ends it; how it ended, when that was not with an answer. */
export function JobPanel({ job, isWorking, error, onCancel }: JobPanelProps) {
  if (isWorking) {
    return (
      <View role="region" aria-label="Being worked out" style={css('w-panel', 'w-stack')}>
        <SmallCaps level={2}>Being worked out</SmallCaps>
        <DefinitionList items={describeProgress(job ?? { step: null, progress: null })} />
        <View style={css('w-row')}>
          <Button kind="quiet" label="Cancel" disabled={job === undefined} onPress={onCancel} />
        </View>
      </View>
    );
  }
  return (
    <>
      <ProblemNotice error={error} title="There is no new answer." />
      {job?.state === 'failed' ? (
        <Notice kind="error" title="There is no new answer." kept={job.problem ?? undefined} />
      ) : null}
      {job?.state === 'cancelled' ? (
        <Notice kind="held" spoken title="Cancelled." kept="Nothing was kept; everything is as it was before." />
      ) : null}
    </>
  );
}
