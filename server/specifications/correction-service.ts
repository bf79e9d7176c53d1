import { createHash } from 'node:crypto';
import type { CorrectionProposal } from '#shared/contracts/specifications.ts';
import { compareCuts } from '#shared/engine/cutout/compare-cuts.ts';
import { SIDES } from '#shared/engine/cutout/cutout-types.ts';
import { proposeCorrection, type Correction, type LearnedSides } from '#shared/engine/cutout/propose-correction.ts';
import { sidesOfCutout, type SideCut } from '#shared/engine/cutout/weighed-sides.ts';
import { listChanges } from '#shared/engine/figures/list-changes.ts';
import { AppError } from '#shared/errors.ts';
import { readSpecification } from '#server/carcases/day-figures.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import {
  findCorrectionByKey,
  insertCorrection,
  listCorrections,
  listDecidedSides,
  listUndecidedDays,
  lockEdition,
} from './correction-queries.ts';
import { findLatestEdition, lastRestoredEdition } from './specification-queries.ts';
import { addEdition, getEdition } from './specification-service.ts';
import { loadWeighedDay } from './weighed-days.ts';

type Evidence = Pick<CorrectionProposal, 'sides' | 'skipped'> & { cuts: SideCut[] };
type Worked = { proposal: CorrectionProposal; correction: Correction };

/** What the farm's scales propose for the newest edition of this specification's name. */
export async function getCorrection(deps: Deps, specificationId: string): Promise<CorrectionProposal> {
  return (await workOut(deps.db, specificationId)).proposal;
}

async function workOut(db: Db | Tx, specificationId: string): Promise<Worked> {
  const { name } = await getEdition(db, specificationId);
  const latest = (await findLatestEdition(db, name)) ?? (await getEdition(db, specificationId));
  const specification = await readSpecification(db, latest.id);
  const evidence = await readEvidence(db, name, specification);
  const decided = await listCorrections(db, name);
  const learned = learnedSides(decided, await lastRestoredEdition(db, name));
  const correction = proposeCorrection(specification, evidence.cuts, learned);
  const proposal: CorrectionProposal = {
    specificationId: latest.id,
    name,
    edition: latest.edition,
    key: evidence.sides.length > 0 ? keyOf(latest.id, evidence.sides, correction) : null,
    sides: evidence.sides,
    skipped: evidence.skipped,
    cuts: compareCuts(...evidence.cuts.map(({ nodes }) => nodes)),
    caution: evidence.sides.length > 0 ? correction.caution : null,
    rows: correction.rows,
    changes: listChanges(specification, correction.specification),
    decided: decided.map(({ rows: _rows, decidedAt, ...row }) => ({ ...row, decidedAt: decidedAt.toISOString() })),
  };
  return { proposal, correction };
}

/** Sides of closed days that nothing was decided on, as the specification would have foreseen them. */
async function readEvidence(
  db: Db | Tx,
  name: string,
  specification: Awaited<ReturnType<typeof readSpecification>>,
): Promise<Evidence> {
  const evidence: Evidence = { sides: [], skipped: [], cuts: [] };
  for (const dayId of await listUndecidedDays(db, name)) {
    const { day, carcases } = await loadWeighedDay(db, dayId, specification);
    const decided = await listDecidedSides(
      db,
      carcases.map(({ id }) => id),
    );
    const isOpen = (carcaseId: string, side: string) =>
      !decided.some((one) => one.carcaseId === carcaseId && one.side === side);
    for (const { id: carcaseId, earTag, nodes, reason } of carcases) {
      if (reason !== null && SIDES.some((side) => isOpen(carcaseId, side))) {
        evidence.skipped.push({ earTag, day: day.day, reason });
      }
      if (reason !== null) continue;
      for (const cut of sidesOfCutout(carcaseId, { nodes })) {
        if (!isOpen(carcaseId, cut.side) || !teaches(cut)) continue;
        evidence.cuts.push(cut);
        evidence.sides.push({ carcaseId, side: cut.side, earTag, day: day.day });
      }
    }
  }
  return evidence;
}

function teaches({ nodes }: SideCut): boolean {
  return nodes.some(({ level, source }) => source === 'weighed' && (level === 'primal' || level === 'line'));
}

/** Sides that accepted corrections rested on, by path. Going back to the shipped figures forgets them. */
function learnedSides(decided: Awaited<ReturnType<typeof listCorrections>>, restoredEdition: number): LearnedSides {
  const learned = new Map<string, number>();
  for (const { resultEdition, rows } of decided) {
    if (resultEdition === null || resultEdition <= restoredEdition) continue;
    for (const { path, sides } of rows) learned.set(path, (learned.get(path) ?? 0) + sides);
  }
  return learned;
}

/** The same edition, sides and weights give the same key, so that an answer sent twice is one decision. */
function keyOf(specificationId: string, sides: CorrectionProposal['sides'], { rows }: Correction): string {
  const named = sides.map(({ carcaseId, side }) => `${carcaseId}/${side}`).sort();
  const weights = rows.map(({ path, proposedPpht }) => `${path} ${proposedPpht}`);
  return createHash('sha256')
    .update(JSON.stringify([specificationId, named, weights]))
    .digest('hex');
}

type Answer = { specificationId: string; key: string; decision: 'accepted' | 'rejected' };
type Decided = { decision: Answer['decision']; resultId: string | null; resultEdition: number | null };

/**
 * Accepting writes the next edition, rejecting keeps the present one; either way these sides are not proposed again.
 * What was decided on is named by its key: the same answer again changes nothing, another answer is refused.
 */
export async function decideCorrection(deps: Deps, byUserId: string, answer: Answer): Promise<Decided> {
  return deps.db.transaction(async (tx) => {
    const { name } = await getEdition(tx, answer.specificationId);
    const latest = (await findLatestEdition(tx, name)) ?? (await getEdition(tx, answer.specificationId));
    await lockEdition(tx, latest.id);
    const before = await findCorrectionByKey(tx, answer.key);
    if (before) return sameAnswer(before, answer);
    const { proposal, correction } = await workOut(tx, answer.specificationId);
    if (proposal.key !== answer.key) throw outOfDate();
    const written =
      answer.decision === 'accepted'
        ? await addEdition(tx, byUserId, {
            name,
            basedOnEdition: proposal.edition,
            body: correction.specification,
            origin: 'learned',
          })
        : null;
    const { specificationId, key } = proposal;
    const row = { specificationId, key, rows: correction.rows, byUserId };
    const decided = { ...row, decision: answer.decision, resultId: written?.id ?? null };
    const subjectId = await insertCorrection(tx, decided, proposal.sides);
    const detail = { name, edition: proposal.edition, sides: proposal.sides.length };
    await recordAudit(tx, { byUserId, action: answer.decision, subject: 'learned percentages', subjectId, detail });
    return { decision: answer.decision, resultId: written?.id ?? null, resultEdition: written?.edition ?? null };
  });
}

function sameAnswer(before: Decided, { decision }: Answer): Decided {
  if (before.decision === decision) return before;
  throw new AppError('STATE_CHANGED', `This proposal has been ${before.decision} already. Nothing was changed.`);
}

function outOfDate(): AppError {
  return new AppError(
    'STATE_CHANGED',
    'The specification or the weights have changed since you looked. Nothing was decided; look at the new proposal.',
  );
}
