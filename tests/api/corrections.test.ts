import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { auditEntry } from '#db/schema/audit.ts';
import { cuttingSpecification } from '#db/schema/carcases.ts';
import { specificationCorrection, specificationCorrectionSide } from '#db/schema/corrections.ts';
import { pack } from '#db/schema/packs.ts';
import type { CorrectionProposal, DayComparison, SpecificationEdition } from '#shared/contracts/specifications.ts';
import { addDays } from '#shared/domain/day.ts';
import { listSpecificationFaults } from '#shared/engine/figures/check-specification.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeFarm } from '#tests/support/make-farm.ts';
import { makeTraditionalCuts } from '#tests/support/make-specification.ts';
import { makeWeighedDay } from '#tests/support/make-weighed-day.ts';

/** More brisket and less chuck than foreseen, both with all of their lines left unweighed. */
const MORE_BRISKET = { 'fore/brisket': 1_100, 'fore/chuck': 950 };

let world: World;
let owner: ReturnType<World['request']>;
let other: ReturnType<World['request']>;
let daysMade = 0;

beforeAll(async () => {
  world = await startWorld();
  await makeFarm(world.db);
  await makeTraditionalCuts(world.db);
  owner = world.request((await world.signIn('owner')).cookie);
  other = world.request((await world.signIn('owner')).cookie);
});
afterAll(() => world.stop());

async function aSpecification(name: string): Promise<SpecificationEdition> {
  const answer = await owner.post('/api/specifications/copies').send({ name, fromId: traditionalSide.id }).expect(200);
  return answer.body as SpecificationEdition;
}
const nextDay = () => addDays(world.clock.today(), -30 - (daysMade += 1));
const aDay = (specificationId: string, more: Partial<Parameters<typeof makeWeighedDay>[1]> = {}) =>
  makeWeighedDay(world.db, { specificationId, day: nextDay(), carcases: 2, perMille: MORE_BRISKET, ...more });
const propose = async (id: string) =>
  (await owner.get(`/api/specifications/${id}/correction`).expect(200)).body as CorrectionProposal;
const answerAs = (who: typeof owner, id: string, answer: { key: string | null; decision: string }) =>
  who.post(`/api/specifications/${id}/correction`).send(answer);
const decide = (id: string, key: string | null, decision: string) => answerAs(owner, id, { key, decision });
const bodyOf = async (id: string) =>
  ((await owner.get(`/api/specifications/${id}`)).body as { body: Specification }).body;
const editionsOf = (name: string) =>
  world.db.select().from(cuttingSpecification).where(eq(cuttingSpecification.name, name));
const sumOf = (body: Specification, id: string) => {
  const primal = body.quarters.flatMap(({ primals }) => primals).find((one) => one.id === id);
  return primal ? primal.tissues.meat + primal.tissues.fat + primal.tissues.bone + primal.tissues.loss : 0;
};

describe('what the scales propose', () => {
  test('from a closed day, is drawn towards the specification by its working, and adds up', async () => {
    const { id } = await aSpecification('Proposed');
    const { carcaseIds } = await aDay(id);
    const proposal = await propose(id);
    expect(proposal.sides.map(({ carcaseId }) => carcaseId)).toEqual(expect.arrayContaining(carcaseIds));
    expect(proposal.sides).toHaveLength(4);
    expect(proposal.caution).toBeNull();
    const brisket = proposal.rows.find(({ path }) => path === 'brisket');
    expect(brisket).toMatchObject({ sides: 4, priorSides: 6, isFromFewSides: false });
    const { seenPpht = 0, proposedPpht = 0 } = brisket ?? {};
    expect(Math.abs(proposedPpht - 100_000 - ((seenPpht - 100_000) * 4) / 10)).toBeLessThanOrEqual(1);
    const change = proposal.changes.find(({ node }) => node === 'brisket/meat');
    expect(change?.toPpht).toBeGreaterThan(change?.fromPpht ?? 0);
  });

  test('from one carcase alone, says that it rests on fewer than three sides', async () => {
    const { id } = await aSpecification('Of one carcase');
    await aDay(id, { carcases: 1 });
    const proposal = await propose(id);
    expect(proposal.caution).toContain('fewer than three');
    expect(proposal.rows.every(({ isFromFewSides }) => isFromFewSides)).toBe(true);
  });

  test('while the day is open, is nothing yet', async () => {
    const { id } = await aSpecification('Still open');
    await aDay(id, { state: 'open' });
    expect(await propose(id)).toMatchObject({ key: null, sides: [], rows: [], changes: [], caution: null });
  });

  test('of a carcase whose weights the newest edition no longer foresees, leaves it out and says why', async () => {
    const { id, name } = await aSpecification('Left out');
    await aDay(id, { carcases: 1, perMille: { 'hind/topside/topside-joint': 1_020 } });
    const body = structuredClone(traditionalSide);
    const topside = body.choices.find((choice) => choice.id === 'topside');
    if (topside) topside.ways = topside.ways.filter((way) => way.id !== 'joint');
    const answer = await owner.post('/api/specifications').send({ name, basedOnEdition: 1, body }).expect(200);
    const proposal = await propose((answer.body as SpecificationEdition).id);
    expect(proposal).toMatchObject({ key: null, sides: [] });
    expect(proposal.skipped).toHaveLength(1);
    expect(proposal.skipped[0]?.reason).toContain('does not foresee what was weighed');
  });
});

describe('a proposal', () => {
  test('that is accepted, is the next edition; the days before it and their sides stay as they were', async () => {
    const { id, name } = await aSpecification('Accepted');
    const { dayId } = await aDay(id);
    const { key } = await propose(id);
    const answer = await decide(id, key, 'accepted').expect(200);
    const { resultId, resultEdition } = answer.body as { resultId: string; resultEdition: number };
    expect(resultEdition).toBe(2);
    const body = await bodyOf(resultId);
    expect(listSpecificationFaults(body)).toEqual([]);
    expect(sumOf(body, 'brisket')).toBeGreaterThan(sumOf(traditionalSide, 'brisket'));
    expect(sumOf(body, 'chuck')).toBeLessThan(sumOf(traditionalSide, 'chuck'));
    expect((await owner.get(`/api/cutting-days/${dayId}`)).body).toMatchObject({ specificationId: id });
    expect((await editionsOf(name)).map(({ origin }) => origin).sort()).toEqual(['copied', 'learned']);
    expect(await propose(id)).toMatchObject({
      key: null,
      edition: 2,
      sides: [],
      decided: [{ decision: 'accepted', sides: 4, basedOnEdition: 1, resultEdition: 2 }],
    });
  });

  test('that is rejected, is kept and never proposed again from the same sides', async () => {
    const { id, name } = await aSpecification('Rejected');
    await aDay(id);
    const { key } = await propose(id);
    await decide(id, key, 'rejected').expect(200);
    expect(await editionsOf(name)).toHaveLength(1);
    expect(await propose(id)).toMatchObject({ key: null, sides: [], decided: [{ decision: 'rejected', sides: 4 }] });
    await aDay(id, { carcases: 1 });
    expect((await propose(id)).sides).toHaveLength(2);
  });

  test('that was accepted, makes the next one slower: what is foreseen counts ten sides by then', async () => {
    const { id } = await aSpecification('Slower');
    await aDay(id);
    await decide(id, (await propose(id)).key, 'accepted').expect(200);
    await aDay(id);
    const brisket = (await propose(id)).rows.find(({ path }) => path === 'brisket');
    expect(brisket).toMatchObject({ sides: 4, priorSides: 10 });
  });

  test('after going back to the shipped figures, starts afresh: what is foreseen counts six sides again', async () => {
    const { id } = await aSpecification('Afresh');
    await aDay(id);
    await decide(id, (await propose(id)).key, 'accepted').expect(200);
    await owner.post(`/api/specifications/${id}/restore`).send({ basedOnEdition: 2 }).expect(200);
    expect(await propose(id)).toMatchObject({ key: null, edition: 3, sides: [] });
    await aDay(id);
    const brisket = (await propose(id)).rows.find(({ path }) => path === 'brisket');
    expect(brisket).toMatchObject({ sides: 4, priorSides: 6 });
  });

  test('answered twice alike, is one decision; answered otherwise, is refused', async () => {
    const { id, name } = await aSpecification('Twice');
    await aDay(id);
    const { key } = await propose(id);
    const first = await decide(id, key, 'accepted').expect(200);
    const again = await decide(id, key, 'accepted').expect(200);
    expect(again.body).toEqual(first.body);
    const otherwise = await decide(id, key, 'rejected').expect(409);
    expect(otherwise.body).toMatchObject({ code: 'STATE_CHANGED' });
    expect(await editionsOf(name)).toHaveLength(2);
    const notes = await world.db.select().from(auditEntry).where(eq(auditEntry.subject, 'learned percentages'));
    expect(notes.filter(({ detail }) => (detail as { name: string }).name === name)).toHaveLength(1);
  });

  test('answered by two owners at once, is decided by one of them', async () => {
    const { id, name } = await aSpecification('Two at once');
    const { carcaseIds } = await aDay(id);
    const { key } = await propose(id);
    const answers = await Promise.all([
      decide(id, key, 'accepted'),
      answerAs(other, id, { key, decision: 'rejected' }),
      answerAs(other, id, { key, decision: 'accepted' }),
    ]);
    const won = answers
      .filter(({ status }) => status === 200)
      .map(({ body }) => (body as { decision: string }).decision);
    expect(new Set(won).size).toBe(1);
    expect(await editionsOf(name)).toHaveLength(won[0] === 'accepted' ? 2 : 1);
    const rows = await world.db
      .select()
      .from(specificationCorrection)
      .where(eq(specificationCorrection.key, key ?? ''));
    expect(rows).toHaveLength(1);
    const sides = await world.db
      .select()
      .from(specificationCorrectionSide)
      .where(eq(specificationCorrectionSide.carcaseId, carcaseIds[0] ?? ''));
    expect(sides).toHaveLength(2);
  });

  test('worked out before somebody saved another edition, is refused and nothing is written', async () => {
    const { id, name } = await aSpecification('Overtaken');
    await aDay(id);
    const { key } = await propose(id);
    const body = { ...traditionalSide, source: 'Our own block test.' };
    await owner.post('/api/specifications').send({ name, basedOnEdition: 1, body }).expect(200);
    const answer = await decide(id, key, 'accepted').expect(409);
    expect(answer.body).toMatchObject({ code: 'STATE_CHANGED' });
    expect(await editionsOf(name)).toHaveLength(2);
  });

  test('is the owner’s to see and to decide', async () => {
    const { id } = await aSpecification('Not a packer’s');
    const packer = world.request((await world.signIn('packer')).cookie);
    await packer.get(`/api/specifications/${id}/correction`).expect(403);
    await answerAs(packer, id, { key: 'a key', decision: 'accepted' }).expect(403);
    await answerAs(world.request(), id, { key: 'a key', decision: 'accepted' }).expect(401);
  });
});

describe('a cutting day beside what was foreseen', () => {
  test('shows each cut by carcase and pooled, by the lines that were weighed', async () => {
    const { id } = await aSpecification('Compared');
    const { dayId } = await aDay(id, { perMille: { 'hind/topside/topside-joint': 1_050 } });
    const day = (await owner.get(`/api/cutting-days/${dayId}/comparison`).expect(200)).body as DayComparison;
    expect(day.carcases).toHaveLength(2);
    const [pooled] = day.pooled;
    expect(pooled).toMatchObject({ id: 'topside-joint', lines: 4 });
    expect(pooled?.weighedGrams).toBe(day.carcases.reduce((sum, { cuts }) => sum + (cuts[0]?.weighedGrams ?? 0), 0));
    expect(Math.round(((pooled?.weighedGrams ?? 0) / (pooled?.estimatedGrams ?? 1)) * 1000)).toBe(1_050);
  });

  test('where nothing was weighed but packs, counts the packs as its scales', async () => {
    const { id } = await aSpecification('By packs');
    const { dayId, carcaseIds } = await aDay(id, { carcases: 1, perMille: {} });
    const [carcaseId = ''] = carcaseIds;
    const packedOn = world.clock.today();
    await world.db.insert(pack).values(
      [1_500, 1_600, 1_700].map((grams) => ({
        code: `PACK${grams}`,
        cuttingDayId: dayId,
        carcaseId,
        cutId: 'silverside-joint',
        grams,
        packedOn,
        useBy: addDays(packedOn, 10),
      })),
    );
    const day = (await owner.get(`/api/cutting-days/${dayId}/comparison`).expect(200)).body as DayComparison;
    expect(day.carcases[0]?.cuts).toEqual([
      expect.objectContaining({ id: 'silverside-joint', lines: 2, weighedGrams: 4_800 }),
    ]);
    expect((await propose(id)).sides).toHaveLength(2);
  });
});
