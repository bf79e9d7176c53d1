import { describe, expect, it } from 'vitest';
import { EngineError } from '#shared/engine/engine-error.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { AppError } from '#shared/errors.ts';
import { cutCarcase, listLeaks, nodeAt } from '#tests/support/make-carcase-facts.ts';

function refusal(run: () => unknown): AppError {
  try {
    run();
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error('it was not refused');
}

describe('the chain from live to hung', () => {
  it('from a live weight alone, estimates hot by killing-out and cold by 2 %', () => {
    const result = cutCarcase({ coldGrams: null, liveGrams: 620_000 });
    expect(result.hot).toEqual({ grams: 334_800, source: 'estimated' });
    expect(result.cold).toEqual({ grams: 328_104, source: 'estimated' });
  });

  it("with the farm's own killing-out, uses it in place of the default", () => {
    const result = cutCarcase({ coldGrams: null, liveGrams: 600_000, killingOutPpht: 56_500 });
    expect(result.hot?.grams).toBe(339_000);
  });

  it('with a hot weight, takes 2 % off and ignores the live estimate', () => {
    const result = cutCarcase({ coldGrams: null, liveGrams: 620_000, hotGrams: 340_000 });
    expect(result.cold).toEqual({ grams: 333_200, source: 'weighed' });
    expect(result.live).toEqual({ grams: 620_000, source: 'weighed' });
  });

  it('with a printed cold weight, it wins over the one worked out', () => {
    expect(cutCarcase({ hotGrams: 340_000, coldGrams: 333_000 }).cold.grams).toBe(333_000);
  });

  it('hung for 21 days, loses 1.69 % of cold weight and 0.5 % of meat as dry surface', () => {
    const result = cutCarcase({ hanging: { method: 'whole side', days: 21 } });
    expect(result.hung).toEqual({ grams: 332_288, source: 'estimated' });
    const loss = result.nodes.filter((node) => node.kind === 'loss').reduce((sum, node) => sum + node.grams, 0);
    expect(Math.round((loss / result.hung.grams) * 10_000)).toBe(150);
  });

  it('in the bag for 21 days, loses 1.0 %', () => {
    expect(cutCarcase({ hanging: { method: 'in the bag', days: 21 } }).hung.grams).toBe(334_620);
  });

  it.each([
    ['live 99 kg', { coldGrams: null, liveGrams: 99_000 }],
    ['live 1,501 kg', { coldGrams: null, liveGrams: 1_501_000 }],
    ['cold 49.999 kg', { coldGrams: 49_999 }],
    ['cold 700.001 kg', { coldGrams: 700_001 }],
    ['no weight at all', { coldGrams: null }],
    ['a weight that is no number', { coldGrams: Number.NaN }],
    ['a side of 19.999 kg', { measured: { left: 19_999 } }],
    ['a negative cut', { measured: { 'left/fore/brisket/trim': -1 } }],
  ])('refuses %s as out of range', (_name, facts) => {
    expect(refusal(() => cutCarcase(facts)).code).toBe('WEIGHT_OUT_OF_RANGE');
  });
});

describe('measured weights', () => {
  it('with nothing measured below the carcase, splits both sides alike and leaks nothing', () => {
    const result = cutCarcase();
    expect(nodeAt(result, 'left').grams).toBe(169_000);
    expect(nodeAt(result, 'right').grams).toBe(169_000);
    expect(listLeaks(result)).toEqual([]);
    expect(result.nodes.every((node) => node.source === 'estimated' || node.level === 'carcase')).toBe(true);
  });

  it('with one side weighed, the other takes what remains', () => {
    const result = cutCarcase({ measured: { hung: 336_000, left: 167_400 } });
    expect(nodeAt(result, 'left')).toMatchObject({ grams: 167_400, source: 'weighed', estimatedGrams: 168_000 });
    expect(nodeAt(result, 'right')).toMatchObject({ grams: 168_600, source: 'estimated' });
    expect(listLeaks(result)).toEqual([]);
  });

  it('with both sides weighed and no hung weight, the carcase weighs their sum', () => {
    const result = cutCarcase({ measured: { left: 167_400, right: 166_900 } });
    expect(result.hung).toEqual({ grams: 334_300, source: 'weighed' });
  });

  it('with parts within 0.5 % of a weighed whole, shows the signed weighing difference', () => {
    const result = cutCarcase({ measured: { hung: 336_000, left: 168_000, right: 167_000 } });
    expect(nodeAt(result, 'carcase').weighingDifferenceGrams).toBe(1_000);
    const over = cutCarcase({ measured: { hung: 336_000, left: 169_000, right: 168_000 } });
    expect(nodeAt(over, 'carcase').weighingDifferenceGrams).toBe(-1_000);
  });

  it('with parts more than 0.5 % off a weighed whole, refuses with both figures', () => {
    const error = refusal(() => cutCarcase({ measured: { hung: 336_000, left: 170_000, right: 168_000 } }));
    expect(error).toBeInstanceOf(EngineError);
    expect(error.code).toBe('MEASURED_EXCEEDS_PARENT');
    expect(error.figures).toEqual({ partsGrams: 338_000, parentGrams: 336_000, differenceGrams: 2_000 });
  });

  it('with exactly 0.5 %, still accepts', () => {
    const result = cutCarcase({ measured: { hung: 336_000, left: 168_000, right: 169_680 } });
    expect(nodeAt(result, 'carcase').weighingDifferenceGrams).toBe(-1_680);
    expect(refusal(() => cutCarcase({ measured: { hung: 336_000, left: 168_000, right: 169_681 } })).code).toBe(
      'MEASURED_EXCEEDS_PARENT',
    );
  });

  it('with one line weighed in a weighed primal, the other lines share the rest', () => {
    const result = cutCarcase({
      measured: { 'left/fore/brisket': 21_000, 'left/fore/brisket/brisket-joint': 12_500 },
    });
    const lines = result.nodes.filter((node) => node.parentPath === 'left/fore/brisket');
    expect(lines.reduce((sum, line) => sum + line.grams, 0)).toBe(21_000);
    expect(nodeAt(result, 'left/fore/brisket/brisket-joint')).toMatchObject({ grams: 12_500, source: 'weighed' });
    expect(nodeAt(result, 'left/fore/brisket/bone').source).toBe('estimated');
  });

  it('with every line of an unweighed primal weighed, the primal weighs their sum and its loss', () => {
    const path = 'left/fore/brisket';
    const result = cutCarcase({
      measured: {
        [`${path}/brisket-joint`]: 7_600,
        [`${path}/trim`]: 900,
        [`${path}/bone`]: 3_100,
        [`${path}/fat`]: 2_900,
      },
    });
    const brisket = nodeAt(result, path);
    expect(brisket).toMatchObject({ source: 'weighed', weighingDifferenceGrams: 0 });
    expect(brisket.grams - 14_500).toBe(nodeAt(result, `${path}/loss`).grams);
    expect(nodeAt(result, 'left').grams).toBe(169_000);
    expect(listLeaks(result)).toEqual([]);
  });

  it('with a cut far above what its estimated primal could hold, refuses it as a slip', () => {
    const error = refusal(() => cutCarcase({ measured: { 'left/fore/brisket/brisket-joint': 80_000 } }));
    expect(error.code).toBe('MEASURED_EXCEEDS_PARENT');
    expect(error.message).toContain('Brisket: the parts weigh 80.000 kg, the whole 14.481 kg.');
  });

  it('with sides that outweigh the cold carcase, refuses: nothing gains by hanging', () => {
    expect(refusal(() => cutCarcase({ measured: { left: 171_000, right: 171_000 } })).code).toBe(
      'MEASURED_EXCEEDS_PARENT',
    );
  });

  it('with a line of another way weighed, cuts the choice that way', () => {
    const result = cutCarcase({ measured: { 'left/fore/fore-rib/rib-eye-steak': 5_700 } });
    expect(nodeAt(result, 'left/fore/fore-rib/rib-eye-steak').grams).toBe(5_700);
    expect(nodeAt(result, 'right/fore/fore-rib/fore-rib').grams).toBeGreaterThan(0);
  });

  it('with a path that is not there, says so by its name', () => {
    const error = refusal(() => cutCarcase({ measured: { 'left/fore/tail': 1_000 } }));
    expect(error.code).toBe('INVALID_INPUT');
    expect(Object.keys(error.fields ?? {})).toEqual(['left/fore/tail']);
  });
});

describe('ways', () => {
  it('on the bone or boned, a primal weighs the same: bone moves into the product', () => {
    const boned = cutCarcase({}, { ways: { left: { 'fore-rib': 'rib-eye' } } });
    const onBone = cutCarcase({}, { ways: { left: { 'fore-rib': 'on-the-bone' } } });
    const path = 'left/fore/fore-rib';
    expect(nodeAt(boned, path).grams).toBe(nodeAt(onBone, path).grams);
    expect(nodeAt(onBone, `${path}/fore-rib`).grams).toBeGreaterThan(nodeAt(boned, `${path}/rib-eye-steak`).grams);
    expect(nodeAt(onBone, `${path}/bone`).grams).toBeLessThan(nodeAt(boned, `${path}/bone`).grams);
  });

  it('over thirty months, closes every way and unit that keeps vertebral column, with the reason', () => {
    const old = cutCarcase({ bornDay: '2024-05-23', killDay: '2026-11-24' });
    const keeping = traditionalSide.choices.flatMap(({ ways }) => ways.filter((way) => way.keepsVertebrae));
    expect(keeping.length).toBeGreaterThan(0);
    expect(old.closedWays).toHaveLength(2 * keeping.length);
    expect(old.sides[0]?.closedUnitReason).toBe(
      'Over 30 months at kill, so vertebral column is taken out in authorised premises.',
    );
    expect(old.nodes.some((node) => node.cutId === 'fore-rib' || node.cutId === 't-bone-steak')).toBe(false);
  });

  it('when a closed way was chosen, the first open one stands in', () => {
    const old = cutCarcase({ bornDay: null }, { ways: { left: { 'fore-rib': 'on-the-bone' } } });
    expect(nodeAt(old, 'left/fore/fore-rib/rib-eye-steak').grams).toBeGreaterThan(0);
    expect(old.isOverThirtyMonths).toBe(true);
    expect(old.ageMonths).toBeNull();
  });

  it('in authorised premises, or with the rule switched off, closes nothing', () => {
    const facts = { bornDay: null };
    for (const rule of [
      { isActive: true, months: 30, isPremisesAuthorised: true },
      { isActive: false, months: 30, isPremisesAuthorised: false },
    ]) {
      expect(cutCarcase(facts, { rule }).closedWays).toEqual([]);
    }
  });
});

describe('the supply of a side', () => {
  it('of the way in use gives the lines of the cutout, of the others their shares', () => {
    const result = cutCarcase({ measured: { 'left/fore/fore-rib/rib-eye-steak': 5_700 } });
    const rib = result.sides[0]?.choices.find((choice) => choice.choiceId === 'fore-rib');
    const eye = rib?.ways.find((way) => way.wayId === 'rib-eye');
    const onBone = rib?.ways.find((way) => way.wayId === 'on-the-bone');
    expect(eye?.yields.find(({ cutId }) => cutId === 'rib-eye-steak')?.grams).toBe(5_700);
    expect(onBone?.yields.find(({ cutId }) => cutId === 'fore-rib')?.grams).toBeGreaterThan(8_000);
    expect(onBone?.yields.map(({ cutId }) => cutId)).toEqual(['fore-rib', 'trim']);
  });

  it('counts the extra work of a way by the weight of its primals', () => {
    const loin = cutCarcase().sides[0]?.choices.find((choice) => choice.choiceId === 'loin-rump');
    const grams = loin?.primals.reduce((sum, primal) => sum + primal.grams, 0) ?? 0;
    const way = loin?.ways.find(({ wayId }) => wayId === 'steaks-rump-steaks');
    expect(way?.costPence).toBe(Math.round((grams * 275) / 10_000));
  });
});
