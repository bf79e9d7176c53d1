import { randomUUID } from 'node:crypto';
import type { Lock } from '#shared/contracts/allocation.ts';
import type { Outcome, WhatIf } from '#shared/contracts/plan-jobs.ts';
import { shortEarTag } from '#shared/domain/ear-tag.ts';
import { cutout } from '#shared/engine/cutout/cutout.ts';
import { marginOf, sumEntries } from '#shared/engine/margin/margin.ts';
import { AppError } from '#shared/errors.ts';
import type { CarcaseFigures, DayCutouts } from '#server/carcases/day-figures.ts';
import type { Deps } from '#server/deps.ts';
import { readDayMoney } from '#server/margin/carcase-accounts.ts';
import { planEntries } from '#server/margin/plan-margin.ts';
import { askAbout, loadDayFacts, type DayFacts } from './day-facts.ts';
import { nameShortfall } from './describe-allocation.ts';
import type { JobControl } from './plan-jobs.ts';
import { solveDay, type SolvedQuestion } from './solve-day.ts';

export type Supposing = { dayId: string; locks: readonly Lock[]; whatIf: WhatIf; timeLimitSeconds: number };

/** Solves a day as it is and as it is supposed to be. Nothing is kept of either. */
export async function answerWhatIf(
  deps: Deps,
  { dayId, locks, whatIf, timeLimitSeconds }: Supposing,
  control: JobControl,
): Promise<{ before: Outcome; after: Outcome }> {
  const facts = await loadDayFacts(deps.db, dayId);
  const how = { timeLimitSeconds, signal: control.signal, onProgress: control.onProgress };
  const answer = async (step: string, of: DayFacts) => {
    control.onStep(step);
    const ids = new Set(of.figures.carcases.map(({ row }) => row.id));
    const kept = locks.filter(({ carcaseId }) => ids.has(carcaseId));
    return describeOutcome(deps, of.figures, await solveDay(askAbout(of, { locks: kept }), deps.solver, how));
  };
  return { before: await answer('As it is', facts), after: await answer('As supposed', suppose(facts, whatIf)) };
}

/** The day with what is supposed to be different. Carcases that are added are like those of the day, in turn. */
export function suppose(facts: DayFacts, { boxes, cuts, hangingDays, moreCarcases }: WhatIf): DayFacts {
  const { specification } = facts.figures;
  const wanted = facts.figures.carcases.length + moreCarcases;
  if (wanted < 1) throw new AppError('NOT_FILLABLE', 'A day needs at least one carcase. Nothing was worked out.');
  const carcases = Array.from({ length: wanted }, (_, at): CarcaseFigures => {
    const like = facts.figures.carcases[at % facts.figures.carcases.length];
    if (!like) throw new Error('the day has no carcase');
    const isAdded = at >= facts.figures.carcases.length;
    const row = isAdded ? { ...like.row, id: randomUUID(), animal: { ...like.row.animal, earTag: '' } } : like.row;
    if (!isAdded && hangingDays === null) return like;
    const hanging = hangingDays === null ? like.facts.hanging : { ...like.facts.hanging, days: hangingDays };
    // What the scales said after hanging would hide another hanging time; another carcase has not been weighed.
    const own = { ...like.facts, id: row.id, hanging, measured: {} };
    const ways = { left: {}, right: {} };
    return { ...like, row, facts: own, cutout: cutout({ carcase: own, specification, rule: like.rule, ways }) };
  });
  const sides = carcases.flatMap((carcase) => carcase.cutout.sides);
  return {
    ...facts,
    figures: { ...facts.figures, carcases, sides },
    kinds: facts.kinds.map((kind) => {
      const { boxKindId: _id, ...changed } = boxes.find(({ boxKindId }) => boxKindId === kind.id) ?? { boxKindId: '' };
      return { ...kind, ...changed };
    }),
    cuts: facts.cuts.map((cut) => {
      const { cutId: _id, ...changed } = cuts.find(({ cutId }) => cutId === cut.id) ?? { cutId: '' };
      return { ...cut, ...changed };
    }),
  };
}

async function describeOutcome(deps: Deps, figures: DayCutouts, solved: SolvedQuestion): Promise<Outcome> {
  const { question, plan } = solved;
  const money = await readDayMoney(deps.db, figures);
  const answer = { plan, weighedCarcaseIds: [], promise: null, explanation: null };
  const entries = planEntries({ cuttingDayId: figures.day.id, input: question, plan: answer }, money);
  const { contributionPence, deadweightPence, gainPence } = marginOf(sumEntries(entries));
  const sum = (of: (carcase: CarcaseFigures) => number) =>
    figures.carcases.reduce((total, carcase) => total + of(carcase), 0);
  const cutName = (cutId: string) => question.input.cuts.find(({ id }) => id === cutId)?.name ?? cutId;
  return {
    carcases: figures.carcases.length,
    coldGrams: sum(({ cutout: of }) => of.cold.grams),
    hungGrams: sum(({ cutout: of }) => of.hung.grams),
    ...{ contributionPence, deadweightPence, gainPence },
    isProven: plan.isProven,
    gapBasisPoints: Math.ceil(plan.gap * 10_000),
    boxes: plan.boxes.map(({ kindId, name, boxes }) => ({ id: kindId, name, count: boxes })),
    cuts: plan.cuts
      .filter(({ madeGrams, stockGrams }) => madeGrams + stockGrams > 0)
      .map(({ cutId, madeGrams, mincedGrams, leftGrams }) => ({
        ...{ id: cutId, name: cutName(cutId), madeGrams, mincedGrams, leftGrams },
        loosePacks: plan.loose.find((each) => each.cutId === cutId)?.packs ?? 0,
      })),
    shortfalls: plan.shortfalls.map(nameShortfall),
    ways: waysOf(figures, solved),
  };
}

/** Of the day's own carcases: those that are only supposed have nothing to compare with. */
function waysOf({ carcases }: DayCutouts, { question, plan }: SolvedQuestion): Outcome['ways'] {
  return plan.fates.flatMap(({ sideId, carcaseId, side, choiceId, wayId }) => {
    const tag = carcases.find(({ row }) => row.id === carcaseId)?.row.animal.earTag;
    const choice = question.input.sides
      .find(({ id }) => id === sideId)
      ?.choices.find((one) => one.choiceId === choiceId);
    if (!tag || !choice) return [];
    const way = choice.ways.find((one) => one.wayId === wayId)?.name ?? 'sold whole';
    return [{ id: `${sideId} ${choiceId}`, place: `${choice.name}, ${shortEarTag(tag)} ${side}`, way }];
  });
}
