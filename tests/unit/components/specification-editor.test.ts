import { describe, expect, it } from 'vitest';
import {
  addLine,
  copyWay,
  cutsToAdd,
  editWay,
  findWay,
  removeLine,
  removeWay,
  setQuarterShare,
  setTake,
  setTissue,
} from '#components/specifications/edit-specification.ts';
import {
  isWrongAt,
  placeOfFault,
  sumOfQuarter,
  sumOfSide,
  sumOfTakes,
  sumWords,
} from '#components/specifications/specification-sums.ts';
import { differencePercent } from '#components/specifications/specification-words.ts';
import { editionsOnOffer, newestEditions } from '#shared/domain/specification-editions.ts';
import { listSpecificationFaults } from '#shared/engine/figures/check-specification.ts';
import { listChanges } from '#shared/engine/figures/list-changes.ts';
import { Specification } from '#shared/engine/figures/specification.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';

const ROLLED = { choiceId: 'brisket', wayId: 'rolled' };
const JOINT = { ...ROLLED, lineId: 'brisket-joint', primalId: 'brisket', tissue: 'meat' } as const;
const nodesOf = (draft: Specification) => listSpecificationFaults(draft).map(({ node }) => node);

describe('editing a draft', () => {
  it('of a primal, is wrong at its quarter until another primal gives what it took', () => {
    const more = setTissue(traditionalSide, { primalId: 'brisket', tissue: 'meat' }, 6_000);
    expect(nodesOf(more)).toEqual(['fore']);
    const brisket = traditionalSide.quarters[0].primals.find(({ id }) => id === 'brisket')?.tissues.meat ?? 0;
    const chuck = traditionalSide.quarters[0].primals.find(({ id }) => id === 'chuck')?.tissues.meat ?? 0;
    const even = setTissue(more, { primalId: 'chuck', tissue: 'meat' }, chuck - (6_000 - brisket));
    expect(nodesOf(even)).toEqual([]);
    expect(traditionalSide.quarters[0].primals.find(({ id }) => id === 'brisket')?.tissues.meat).toBe(brisket);
    expect(listChanges(traditionalSide, even).map(({ node }) => node)).toEqual(['chuck/meat', 'brisket/meat']);
  });

  it('of a quarter’s share, is wrong at the quarter and at the side', () => {
    const draft = setQuarterShare(traditionalSide, 'hind', 10_000);
    expect(nodesOf(draft)).toEqual(['side', 'hind']);
    expect(sumOfSide(draft)).toBe(sumOfQuarter(traditionalSide.quarters[0]) + 10_000);
  });

  it('of a line, is wrong at the tissue of the primal that it takes from', () => {
    const draft = setTake(traditionalSide, JOINT, 50_000);
    expect(nodesOf(draft)).toEqual(['brisket/rolled/brisket/meat']);
    const way = findWay(draft, ROLLED);
    expect(way && sumOfTakes(way, 'brisket', 'meat')).toBeLessThan(100_000);
    const [fault] = listSpecificationFaults(draft);
    expect(fault && placeOfFault(draft, fault)).toEqual({ kind: 'way', choiceId: 'brisket', id: 'rolled' });
    const faults = listSpecificationFaults(draft);
    expect(isWrongAt({ kind: 'choice', id: 'brisket' }, draft, faults)).toBe(true);
    expect(isWrongAt({ kind: 'choice', id: 'chuck' }, draft, faults)).toBe(false);
  });

  it('by a cut more, adds up as before, and by a cut less, does not', () => {
    const way = findWay(traditionalSide, ROLLED);
    const added = way ? cutsToAdd(traditionalSide, way)[0]?.id : undefined;
    const draft = addLine(traditionalSide, ROLLED, added ?? '');
    expect(findWay(draft, ROLLED)?.lines.some(({ id }) => id === added)).toBe(true);
    expect(nodesOf(draft)).toEqual([]);
    expect(Specification.safeParse(draft).success).toBe(true);
    expect(nodesOf(removeLine(traditionalSide, ROLLED, 'brisket-joint'))).toContain('brisket/rolled/brisket/meat');
    expect(addLine(traditionalSide, ROLLED, 'mince')).toBe(traditionalSide);
  });

  it('by a copy of a way, has an id of its own each time, and is as before once it is taken out', () => {
    const once = copyWay(traditionalSide, ROLLED);
    const twice = once && copyWay(once.draft, { choiceId: 'brisket', wayId: once.wayId });
    expect([once?.wayId, twice?.wayId]).toEqual(['rolled-2', 'rolled-3']);
    expect(twice && nodesOf(twice.draft)).toEqual([]);
    expect(twice && Specification.safeParse(twice.draft).success).toBe(true);
    const back = once && removeWay(once.draft, { choiceId: 'brisket', wayId: once.wayId });
    expect(back).toEqual(traditionalSide);
  });

  it('of a way’s name and vertebrae, changes nothing else', () => {
    const draft = editWay(traditionalSide, ROLLED, { name: 'Rolled and tied', keepsVertebrae: true });
    expect(findWay(draft, ROLLED)).toMatchObject({ name: 'Rolled and tied', keepsVertebrae: true });
    expect(listChanges(traditionalSide, draft).filter(({ fromPpht, toPpht }) => fromPpht !== toPpht)).toEqual([]);
  });
});

describe('words about shares', () => {
  it('say what is missing or too much', () => {
    expect(sumWords(100_000, 100_000)).toBe('adds up to 100 %');
    expect(sumWords(99_400, 100_000)).toBe('adds up to 99.4 %: 0.6 % missing');
    expect(sumWords(51_205, 51_200)).toBe('adds up to 51.205 %: 0.005 % too much');
  });

  it('say how far a weight was off, to a tenth of a per cent', () => {
    expect(differencePercent(10_240, 10_000)).toBe('+ 2.4 %');
    expect(differencePercent(9_920, 10_000)).toBe('− 0.8 %');
    expect(differencePercent(10_000, 10_000)).toBe('as foreseen');
    expect(differencePercent(500, 0)).toBe('not foreseen');
  });
});

describe('editions on offer', () => {
  const edition = (name: string, number: number, isRetired = false) => ({ name, edition: number, isRetired });
  const list = [edition('A', 1), edition('A', 3), edition('A', 2), edition('B', 1, true)];

  it('are the newest of each name, without those that are retired', () => {
    expect(newestEditions(list).map((one) => `${one.name}${one.edition}`)).toEqual(['A3', 'B1']);
    expect(editionsOnOffer(list).map((one) => `${one.name}${one.edition}`)).toEqual(['A3']);
  });
});
