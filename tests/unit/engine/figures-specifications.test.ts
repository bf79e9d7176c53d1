import { describe, expect, it } from 'vitest';
import { apportion } from '#shared/engine/apportion.ts';
import { EngineError } from '#shared/engine/engine-error.ts';
import { checkSpecification, listSpecificationFaults } from '#shared/engine/figures/check-specification.ts';
import { BONELESS_PRIMAL_KG, sumTissues } from '#shared/engine/figures/reference-tissues.ts';
import { Specification } from '#shared/engine/figures/specification.ts';
import { cowSide } from '#shared/engine/figures/cow-side.ts';
import { seamSide } from '#shared/engine/figures/seam-side.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { cutCarcase } from '#tests/support/make-carcase-facts.ts';

const shipped = [traditionalSide, seamSide, cowSide];
const primalsOf = (specification: Specification) => specification.quarters.flatMap((quarter) => quarter.primals);

describe.each(shipped)('the shipped specification $id', (specification) => {
  it('answers its own schema and adds up everywhere', () => {
    expect(Specification.parse(specification)).toEqual(specification);
    expect(listSpecificationFaults(specification)).toEqual([]);
  });

  it('keeps a default way open for a carcase over thirty months in every choice', () => {
    for (const choice of specification.choices) {
      expect(choice.ways.some((way) => !way.keepsVertebrae)).toBe(true);
    }
  });

  it('names every cut that a way makes and offers none that no way makes, but mince', () => {
    const made = new Set(
      specification.choices.flatMap((choice) =>
        choice.ways.flatMap((way) =>
          way.lines.filter((line) => ['cut', 'trim'].includes(line.kind)).map(({ id }) => id),
        ),
      ),
    );
    const named = specification.cuts.filter((cut) => cut.kind !== 'mince').map((cut) => cut.id);
    expect([...made].sort()).toEqual([...named].sort());
  });

  it('merges only neighbours for a narrow rail, each primal once', () => {
    expect(specification.narrowPrimals.flatMap((group) => group.primalIds)).toEqual(
      primalsOf(specification).map((primal) => primal.id),
    );
  });
});

describe('the traditional side', () => {
  it('gives 70.0 meat, 10.7 fat, 18.3 bone and 1.0 loss', () => {
    const total = sumTissues(primalsOf(traditionalSide).map((primal) => primal.tissues));
    expect(total).toEqual({ meat: 70_000, fat: 10_700, bone: 18_300, loss: 1_000 });
  });

  it('has a forequarter of 50 to 52 %, as the trade counts on the cut between the tenth and eleventh rib', () => {
    const [fore, hind] = traditionalSide.quarters;
    expect(fore.sharePpht).toBeGreaterThanOrEqual(50_000);
    expect(fore.sharePpht).toBeLessThanOrEqual(52_000);
    expect(fore.sharePpht + hind.sharePpht).toBe(100_000);
  });

  it('carries the published boneless primals, scaled to 70 % by largest remainder', () => {
    const scaled = apportion(
      70_000,
      Object.entries(BONELESS_PRIMAL_KG).map(([id, kg]) => ({ id, weight: Math.round(kg * 100) })),
    );
    const meat = new Map(primalsOf(traditionalSide).map((primal) => [primal.id, primal.tissues.meat]));
    const published = (...ids: (keyof typeof BONELESS_PRIMAL_KG)[]) =>
      ids.reduce((sum, id) => sum + (scaled.get(id) ?? NaN), 0);
    const ours = (...ids: string[]) => ids.reduce((sum, id) => sum + (meat.get(id) ?? NaN), 0);
    expect(ours('topside')).toBe(published('topside'));
    expect(ours('silverside')).toBe(published('silversideFlat', 'salmonCut'));
    expect(ours('thick-flank')).toBe(published('thickFlank'));
    expect(ours('loin', 'rump')).toBe(published('striploin', 'fillet', 'rump'));
    expect(ours('fore-rib')).toBe(published('cubeRoll'));
    expect(ours('flank')).toBe(published('bavette'));
    expect(ours('brisket')).toBe(published('brisket'));
    expect(ours('blade')).toBe(published('chuckTender'));
    expect(ours('leg-of-mutton')).toBe(published('legOfMutton'));
    expect(ours('chuck')).toBe(published('chuckAndNeck'));
    expect(ours('fore-shin', 'hind-shin')).toBe(published('heelAndShank'));
  });
});

/** Share of a side's products by how they are cooked, each choice cut its first way. */
function shareOf(specification: Specification, cooking: string): number {
  const { conformation, fatClass } = specification.reference;
  const result = cutCarcase({ conformation, fatClass }, { specification });
  const products = result.nodes.filter((node) => node.cutId !== null);
  const cooked = new Map(specification.cuts.map((cut) => [cut.id, cut.cooking]));
  const sum = (nodes: typeof products) => nodes.reduce((total, node) => total + node.grams, 0);
  return sum(products.filter((node) => cooked.get(node.cutId ?? '') === cooking)) / sum(products);
}

describe('the three sides beside each other', () => {
  it('the seam side gives most for the grill, the cow most for the mincer', () => {
    expect(shareOf(seamSide, 'grill')).toBeGreaterThan(shareOf(traditionalSide, 'grill') * 1.3);
    expect(shareOf(cowSide, 'mince')).toBeGreaterThan(0.7);
    expect(shareOf(cowSide, 'mince')).toBeGreaterThan(shareOf(traditionalSide, 'mince') * 2);
  });

  it('a steer cut by the specification of a cow has the meat of a steer', () => {
    const meat = (specification: Specification) => {
      const { nodes } = cutCarcase({}, { specification });
      return nodes.find(({ path }) => path === 'left/hind/topside')?.grams ?? 0;
    };
    expect(Math.abs(meat(cowSide) / meat(traditionalSide) - 1)).toBeLessThan(0.001);
  });

  it('no way of the cow keeps vertebral column', () => {
    expect(cowSide.choices.flatMap(({ ways }) => ways).some((way) => way.keepsVertebrae)).toBe(false);
  });
});

describe('a specification that does not add up', () => {
  it('when a primal has lost a share, names the quarter with both sums', () => {
    const broken = structuredClone(traditionalSide);
    const primal = broken.quarters[0].primals[0];
    if (!primal) throw new Error('no primal');
    primal.tissues.meat -= 50;
    expect(() => checkSpecification(broken)).toThrow(EngineError);
    const [fault] = listSpecificationFaults(broken);
    expect(fault).toMatchObject({ node: 'fore', sumPpht: 50_626, expectedPpht: 50_676 });
    expect(fault?.sentence).toBe('Forequarter adds up to 50.626 %, not to 50.676 %.');
  });

  it('when a way leaves meat unspoken for, names choice, way, primal and tissue', () => {
    const broken = structuredClone(traditionalSide);
    const take = broken.choices.find(({ id }) => id === 'brisket')?.ways[0]?.lines[0]?.takes[0];
    if (!take) throw new Error('no take');
    take.meat -= 1_000;
    expect(listSpecificationFaults(broken)).toEqual([
      {
        node: 'brisket/rolled/brisket/meat',
        sentence: 'Boned and rolled: meat of brisket adds up to 99 %, not to 100 %.',
        sumPpht: 99_000,
        expectedPpht: 100_000,
      },
    ]);
  });

  it('when a primal is covered twice or never, says so', () => {
    const twice = structuredClone(traditionalSide);
    twice.choices.push({ ...structuredClone(twice.choices[0]), id: 'again' } as (typeof twice.choices)[number]);
    expect(listSpecificationFaults(twice).map(({ sentence }) => sentence)).toEqual([
      'fore-shin is covered by 2 choices; it must be exactly one.',
    ]);
    const never = structuredClone(traditionalSide);
    never.choices = never.choices.filter(({ id }) => id !== 'flank');
    expect(listSpecificationFaults(never).map(({ node }) => node)).toEqual(['flank']);
  });
});
