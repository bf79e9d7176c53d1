import type { PlanJob } from '#shared/contracts/plan-jobs.ts';
import { formatMoney } from '#shared/domain/words.ts';

const PHASES: Record<NonNullable<PlanJob['progress']>['phase'], string> = {
  shortfall: 'Looking for the least shortfall of what is promised',
  contribution: 'Looking for the greatest contribution',
  packs: 'Making whole packs of it',
};

/** The figures of a plan that is being worked out, as they stand now. */
export function describeProgress({ step, progress }: Pick<PlanJob, 'step' | 'progress'>) {
  const best = progress?.bestPence ?? null;
  const isShortfall = progress?.phase === 'shortfall';
  return [
    ...(step === null ? [] : [{ term: 'Answer', value: step }]),
    { term: 'Phase', value: progress ? PHASES[progress.phase] : 'Getting ready' },
    {
      term: isShortfall ? 'Missing at best so far' : 'Best so far',
      note: isShortfall ? undefined : 'Before kill, haulage and card fees',
      value: best === null ? 'nothing yet' : formatMoney(best),
    },
    {
      term: 'Gap',
      note: 'How much better an answer could still be',
      value: progress?.gapBasisPoints == null ? 'not known yet' : `${(progress.gapBasisPoints / 100).toFixed(2)} %`,
    },
    { term: 'Elapsed', value: `${((progress?.milliseconds ?? 0) / 1000).toFixed(1)} s` },
  ];
}
