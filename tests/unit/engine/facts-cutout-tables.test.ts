import { describe, expect, it } from 'vitest';
import { apportion } from '#shared/engine/apportion.ts';
import { effectiveSpecification } from '#shared/engine/cutout/effective-specification.ts';
import { britishCuts } from '#shared/engine/figures/british-cuts.ts';
import { toQuarter } from '#shared/engine/figures/reference-tissues.ts';
import type { Primal, Specification } from '#shared/engine/figures/specification.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { buildWay } from '#shared/engine/figures/way-builder.ts';
import { cutCarcase, makeCarcaseFacts } from '#tests/support/make-carcase-facts.ts';

/** The international pound. */
const POUND_GRAMS = 453.59237;
const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);
const tenths = (values: readonly number[]) => sum(values.map((value) => Math.round(value * 10)));

describe('boneless primals of 31,827 cattle (Judge et al. 2019, J Anim Sci 97:2769-2779, doi 10.1093/jas/skz152)', () => {
  /** The specification is fitted on the means of table 1: 237.09 kg of boneless meat. */
  const meatKg = (bonelessKg: number) => {
    const { quarters } = effectiveSpecification(traditionalSide, makeCarcaseFacts());
    const meat = new Map(quarters.flatMap(({ primals }) => primals.map(({ id, tissues }) => [id, tissues.meat])));
    return (...ids: string[]) => (sum(ids.map((id) => meat.get(id) ?? NaN)) / 70_000) * bonelessKg;
  };

  it('foretells the group means that the paper prints beside them, which other counts of cattle gave, within 1.5 %', () => {
    const kg = meatKg(237.09);
    const groups = [
      [kg('loin', 'rump'), 43.28],
      [kg('topside', 'silverside', 'thick-flank'), 60.94],
      [kg('flank', 'blade', 'leg-of-mutton', 'chuck', 'fore-shin', 'hind-shin'), 104.1],
    ] as const;
    for (const [ours, published] of groups) expect(Math.abs(ours / published - 1)).toBeLessThan(0.015);
  });

  it.each([
    // Transl Anim Sci 3:893-902 (2019), doi 10.1093/tas/txz042, table 2: lowest and highest group of genetic merit, kg.
    {
      name: 'lowest',
      boneless: 230.25,
      kg: { topside: 22.13, loinRump: 40.8, rib: 12.61, brisket: 15.98, chuck: 36.61, lmc: 26.83, shin: 11.86 },
    },
    {
      name: 'highest',
      boneless: 270.2,
      kg: { topside: 27.91, loinRump: 47.45, rib: 13.53, brisket: 18.68, chuck: 43.1, lmc: 30.91, shin: 14.03 },
    },
  ])('foretells each primal of the $name genetic group from its total, within 6 %', ({ boneless, kg: published }) => {
    const kg = meatKg(boneless);
    const ours = {
      topside: kg('topside'),
      loinRump: kg('loin', 'rump'),
      rib: kg('fore-rib'),
      brisket: kg('brisket'),
      chuck: kg('chuck'),
      lmc: kg('leg-of-mutton'),
      shin: kg('fore-shin', 'hind-shin'),
    };
    for (const name of ['topside', 'loinRump', 'rib', 'brisket', 'chuck', 'lmc', 'shin'] as const) {
      expect(Math.abs(ours[name] / published[name] - 1)).toBeLessThan(0.06);
    }
  });
});

describe('freezer beef of Michigan State University Extension (how much to expect, part two)', () => {
  /** Pounds taken home from carcases of 600, 700 and 800 lb. */
  const table = {
    chuck: [122, 142, 162],
    rib: [38, 44, 50],
    loin: [67, 78, 90],
    round: [92, 108, 123],
    'brisket-plate-flank': [80, 93, 106],
    misc: [21, 25, 28],
  } as const;
  const names = Object.keys(table) as (keyof typeof table)[];

  /** A specification from the 600 lb column alone; the 180 lb that are not taken home follow the primals. */
  function fitted(): Specification {
    const tissue = (total: number) =>
      apportion(
        total,
        names.map((id) => ({ id, weight: table[id][0] })),
      );
    const [meat, rest] = [tissue(70_000), tissue(30_000)];
    const primal = (id: (typeof names)[number]): Primal => {
      const tissues = { meat: meat.get(id) ?? 0, fat: 0, bone: rest.get(id) ?? 0, loss: 0 };
      return { id, name: id, shortName: id.slice(0, 16), hasVertebrae: false, tissues };
    };
    const way = (id: string) =>
      buildWay([id], { id: 'home', name: 'Home', cuts: { trim: { [id]: { meat: 100_000 } } } });
    const primals = names.map(primal);
    return {
      ...traditionalSide,
      id: 'michigan',
      quarters: [toQuarter('fore', primals.slice(0, 2)), toQuarter('hind', primals.slice(2))],
      narrowPrimals: [{ id: 'all', name: 'All', shortName: 'All', primalIds: ['chuck'] }],
      choices: names.map((id) => ({ id, name: id, primalIds: [id], ways: [way(id)] })),
      cuts: britishCuts(new Set(['trim'])),
    };
  }

  it.each([
    [700, 1],
    [800, 2],
  ] as const)('fitted on 600 lb, gives every row of the %i lb column within one pound', (pounds, column) => {
    const coldGrams = Math.round(pounds * POUND_GRAMS);
    const result = cutCarcase({ coldGrams }, { specification: fitted() });
    for (const id of names) {
      const lines = result.nodes.filter(({ path, cutId }) => cutId === 'trim' && path.includes(`/${id}/`));
      const ours = sum(lines.map(({ grams }) => grams)) / POUND_GRAMS;
      expect(Math.abs(ours - table[id][column])).toBeLessThanOrEqual(1);
    }
    const total = sum(result.nodes.filter(({ cutId }) => cutId === 'trim').map(({ grams }) => grams)) / POUND_GRAMS;
    // The printed total is the sum of six rounded cells.
    expect(Math.abs(total - sum(names.map((id) => table[id][column])))).toBeLessThanOrEqual(6 * 0.5);
  });
});

describe('the trade table of a 1,150 lb steer with a 715 lb carcase (reprinted by gourmetsleuth.com, cut yield per steer)', () => {
  const primals = {
    chuck: { printed: 209.5, meat: [33.9, 83.3, 35.5, 25.4], waste: 31.4 },
    round: { printed: 155.8, meat: [34.6, 31.2, 16.8, 7.8, 33.4], waste: 32.0 },
    thin: { printed: 134.6, meat: [3.6, 2.9, 2.2, 2.5, 16.0, 87.3], waste: 20.1 },
    loin: { printed: 115.7, meat: [6.8, 19.6, 9.8, 15.0, 15.3, 22.7], waste: 26.5 },
    rib: { printed: 66.6, meat: [23.9, 9.2, 8.6, 16.5], waste: 8.4 },
  };
  const all = Object.values(primals);
  /** Kidney and hanging tender, fat and suet: from memory; together they are what the printed totals leave. */
  const misc = { meat: 4.9, waste: 27.9 };

  it('the rows of each primal add up to its printed total, to the tenth of a pound', () => {
    for (const { printed, meat, waste } of all) expect(tenths([...meat, waste])).toBe(tenths([printed]));
  });

  it('the printed primals leave 32.8 lb for the rest of the carcase', () => {
    expect(7150 - tenths(all.map(({ printed }) => printed))).toBe(328);
    expect(tenths([misc.meat, misc.waste])).toBe(328);
  });

  it('meat and waste of all rows are the printed 569 and 146 lb, and 62.2 % of live weight hung', () => {
    const meat = tenths([...all.flatMap((primal) => primal.meat), misc.meat]);
    const waste = tenths([...all.map((primal) => primal.waste), misc.waste]);
    expect(meat + waste).toBe(7150);
    expect(Math.round(meat / 10)).toBe(569);
    expect(Math.round(waste / 10)).toBe(146);
    expect(Math.round((715 / 1150) * 1000) / 10).toBe(62.2);
  });

  it('of the meat, the share that is ground or stew lies within two points of our mince and slow-cooking pool', () => {
    // Ground and stew of five primals; ours: flank, blade, leg of mutton cut, chuck and shin are the same 43 to 44 %.
    const ground = tenths([83.3, 33.4, 87.3, 22.7, 16.5]);
    const meat = tenths(all.flatMap((primal) => primal.meat));
    const { quarters } = effectiveSpecification(traditionalSide, makeCarcaseFacts());
    const pool = new Set(['flank', 'blade', 'leg-of-mutton', 'chuck', 'fore-shin', 'hind-shin']);
    const ours = quarters.flatMap((quarter) => quarter.primals.filter(({ id }) => pool.has(id)));
    const share = sum(ours.map(({ tissues }) => tissues.meat)) / 70_000;
    expect(Math.abs(share - ground / meat)).toBeLessThan(0.02);
  });
});

describe('how much eating meat (Indiana State Board of Animal Health)', () => {
  it('the retail rows of a 590 lb carcase add up to 465 lb, and with bone, fat and shrink to 590', () => {
    const rows = [35, 40, 65, 45, 20, 105, 110, 45];
    expect(sum(rows)).toBe(465);
    expect(sum(rows) + 125).toBe(590);
  });

  it('the printed 6 % of chuck cannot stand: its own pounds say 26, and then the carcase adds up', () => {
    const rest = [22, 17, 9, 4, 12, 4, 6];
    const [low, high] = [148, 158];
    expect(sum(rest) + 26).toBe(100);
    expect(590 * 0.26).toBeGreaterThanOrEqual(low);
    expect(590 * 0.26).toBeLessThanOrEqual(high);
  });
});

describe('bone-in weights of the trade (common practice)', () => {
  /** Boneless kg over bone-in kg of the same meat. */
  const cases = [
    { choiceId: 'fore-rib', wayId: 'on-the-bone', cutId: 'fore-rib', boned: 0.95, low: 0.62, high: 0.68 },
    { choiceId: 'fore-shin', wayId: 'on-the-bone', cutId: 'shin-on-the-bone', boned: 0.95, low: 0.5, high: 0.55 },
    { choiceId: 'hind-shin', wayId: 'on-the-bone', cutId: 'shin-on-the-bone', boned: 0.95, low: 0.5, high: 0.55 },
    { choiceId: 'brisket', wayId: 'on-the-bone', cutId: 'brisket-on-the-bone', boned: 0.96, low: 0.7, high: 0.75 },
    { choiceId: 'loin-rump', wayId: 't-bone-rump-steaks', cutId: 't-bone-steak', boned: 0.9, low: 0.68, high: 0.72 },
  ];

  it.each(cases)('$cutId from $choiceId', ({ choiceId, wayId, cutId, boned, low, high }) => {
    const result = cutCarcase({}, { ways: { left: { [choiceId]: wayId } } });
    const choice = result.sides[0]?.choices.find((one) => one.choiceId === choiceId);
    const primalId = choice?.primals[0]?.primalId;
    const primal = traditionalSide.quarters.flatMap(({ primals }) => primals).find(({ id }) => id === primalId);
    const grams =
      choice?.ways.find((way) => way.wayId === wayId)?.yields.find((one) => one.cutId === cutId)?.grams ?? 0;
    const boneless = ((primal?.tissues.meat ?? 0) / 100_000) * 169_000 * boned;
    expect(boneless / grams).toBeGreaterThanOrEqual(low);
    expect(boneless / grams).toBeLessThanOrEqual(high);
  });
});
