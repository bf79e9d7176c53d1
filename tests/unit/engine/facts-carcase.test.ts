import { describe, expect, it } from 'vitest';
import { composition, compositionOfPoints } from '#shared/engine/cutout/composition.ts';
import { isOlderThan } from '#shared/engine/cutout/vertebrae-rule.ts';
import { coldFromHot, KILLING_OUT_PPHT } from '#shared/engine/cutout/weight-chain.ts';
import {
  conformationTenths,
  CONFORMATIONS,
  FAT_CLASSES,
  fatTenths,
  fifteenPointTenths,
} from '#shared/engine/figures/class-scale.ts';

/** Percent of the carcase, as published figures are. */
const percent = (ppht: number) => ppht / 1000;

describe('hot to cold weight', () => {
  // Delegated Regulation (EU) 2017/1182, article 7 (cited in Implementing Regulation (EU) 2017/1184); 2 % from memory.
  it.each([
    [100_000, 98_000],
    [337_500, 330_750],
    [318_367, 312_000],
    [344_898, 338_000],
  ])('%i g hot is %i g cold', (hot, cold) => {
    expect(coldFromHot(hot)).toBe(cold);
  });

  it('half a gram rounds away from zero, once', () => {
    expect(coldFromHot(50_025)).toBe(49_025);
    expect(coldFromHot(50_075)).toBe(49_074);
  });
});

describe('the class scales', () => {
  // Order: Regulation (EU) 1308/2013, annex IV(A) as kept in Great Britain; numbers of the fifteen points from memory.
  it('the Union scale counts 1 to 15 from P- to E+ and from 1- to 5+', () => {
    const steps = ['-', '=', '+'];
    const points = (letters: string) =>
      [...letters].flatMap((letter) => steps.map((step) => fifteenPointTenths(`${letter}${step}`) / 10));
    const oneToFifteen = Array.from({ length: 15 }, (_, at) => at + 1);
    expect(points('PORUE')).toEqual(oneToFifteen);
    expect(points('12345')).toEqual(oneToFifteen);
  });

  it('the British sub-classes rise in the order of the trade, each inside its class of the Union scale', () => {
    const places = CONFORMATIONS.map(conformationTenths);
    expect(places).toEqual([...places].sort((a, b) => a - b));
    const fat = FAT_CLASSES.map(fatTenths);
    expect(fat).toEqual([...fat].sort((a, b) => a - b));
    for (const name of CONFORMATIONS) {
      const letter = name.replace(/[+-]/, '');
      expect(conformationTenths(name)).toBeGreaterThanOrEqual(fifteenPointTenths(`${letter}-`));
      expect(conformationTenths(name)).toBeLessThanOrEqual(fifteenPointTenths(`${letter}+`));
    }
    for (const name of FAT_CLASSES) {
      expect(fatTenths(name)).toBeGreaterThanOrEqual(fifteenPointTenths(`${name.charAt(0)}-`));
      expect(fatTenths(name)).toBeLessThanOrEqual(fifteenPointTenths(`${name.charAt(0)}+`));
    }
  });

  it('S is read as the top of the scale; a class that does not exist is refused', () => {
    expect(conformationTenths('S')).toBe(fifteenPointTenths('E+'));
    expect(() => conformationTenths('X')).toThrow('There is no conformation class X.');
    expect(() => fatTenths('6')).toThrow('There is no fat class 6.');
    expect(() => fifteenPointTenths('U')).toThrow('There is no class U');
  });
});

describe('over thirty months', () => {
  // Regulation (EC) 999/2001, annex V (2018): vertebral column of bovines aged over 30 months.
  it.each([
    { name: 'the day before thirty months', born: '2024-06-01', killed: '2026-11-30', isOver: false },
    { name: 'thirty months to the day', born: '2024-06-01', killed: '2026-12-01', isOver: false },
    { name: 'the day after', born: '2024-06-01', killed: '2026-12-02', isOver: true },
    { name: 'born on the 31st, last day of a shorter month', born: '2024-05-31', killed: '2026-11-30', isOver: false },
    { name: 'born on the 31st, the day after', born: '2024-05-31', killed: '2026-12-01', isOver: true },
    { name: 'born on 29 February, to the day', born: '2024-02-29', killed: '2026-08-29', isOver: false },
    { name: 'born on 29 February, the day after', born: '2024-02-29', killed: '2026-08-30', isOver: true },
    { name: 'born on 31 August, up in February', born: '2023-08-31', killed: '2026-02-28', isOver: false },
    { name: 'born on 31 August, the first of March', born: '2023-08-31', killed: '2026-03-01', isOver: true },
  ])('$name: $isOver', ({ born, killed, isOver }) => {
    expect(isOlderThan(born, killed, 30)).toBe(isOver);
  });
});

describe('differences between classes', () => {
  it('a point of conformation is worth +11.2 g and a point of fat -8.2 g of meat a kg', () => {
    // Conroy, Drennan, Kenny and McGee, Animal (online 2009): 336 steers, fifteen-point scales.
    const at = (conformation: number, fatClass: number) =>
      compositionOfPoints({ conformation: conformation * 10, fatClass: fatClass * 10 }).tissues.meat;
    for (const conformation of [4, 6, 8, 10]) expect(at(conformation + 1, 9) - at(conformation, 9)).toBe(1_120);
    for (const fatClass of [5, 7, 9, 11]) expect(at(7, fatClass + 1) - at(7, fatClass)).toBe(-820);
  });

  it('a whole class of conformation is 3.4 points of meat, where 507 dissected steers gave 3.5', () => {
    // Drennan's dissection of 507 steers, reported in the Irish Farmers Journal (article 187873).
    const step = percent(composition('R', '3').tissues.meat - composition('O', '3').tissues.meat);
    expect(step).toBeCloseTo(3.36, 10);
    expect(Math.abs(step - 3.5)).toBeLessThan(0.25);
  });

  it('suckler U- 3+ against Holstein O- 3+ lies within 0.6 points of the dissection, tissue by tissue', () => {
    // Same dissection: +6.2 meat, -1.7 fat, -4.5 bone. The model's slopes are scaled to the steeper slope of meat.
    const suckler = compositionOfPoints({ conformation: 100, fatClass: 90 }).tissues;
    const holstein = compositionOfPoints({ conformation: 40, fatClass: 90 }).tissues;
    const published = { meat: 6.2, fat: -1.7, bone: -4.5 };
    for (const tissue of ['meat', 'fat', 'bone'] as const) {
      const ours = percent(suckler[tissue] - holstein[tissue]);
      expect(Math.abs(ours - published[tissue])).toBeLessThan(0.6);
    }
  });

  it("O 4H to U 2 is 12.05 points by the model, where the cutting project weighed 11: the model's own figure stands", () => {
    // Eblex cutting project, Meat Trades Journal (archive story 13125): +11 % of side weight, 31.8 kg of 289.2 kg.
    const ours = percent(composition('U', '2').tissues.meat - composition('O', '4H').tissues.meat);
    expect(ours).toBeCloseTo(12.05, 10);
    expect(Math.round(289.2 * 0.11 * 10) / 10).toBe(31.8);
    const publishedPoints = 11;
    expect(Math.abs(ours - publishedPoints)).toBeLessThan(1.5);
  });

  it('over all classes meat stays between the fattest and the leanest that grading has seen', () => {
    // New Zealand grading 1986 (643 steers, 273 heifers, 1,086 bulls): 59 to 72.6 % saleable; 78 from the Eblex spread.
    for (const conformation of CONFORMATIONS) {
      for (const fatClass of FAT_CLASSES) {
        const { tissues } = composition(conformation, fatClass);
        expect(tissues.meat + tissues.fat + tissues.bone + tissues.loss).toBe(100_000);
        expect(tissues.meat).toBeGreaterThanOrEqual(58_000);
        expect(tissues.meat).toBeLessThanOrEqual(78_000);
        expect(tissues.fat).toBeGreaterThanOrEqual(1_000);
        expect(tissues.bone).toBeGreaterThan(10_000);
      }
    }
  });

  it('outside the range of the source, the class is brought back to its edge and says so', () => {
    const { clamps } = composition('E', '5H');
    expect(clamps.map(({ what, from, to }) => [what, from, to])).toEqual([
      ['conformation', 140, 120],
      ['fat class', 145, 133],
    ]);
    expect(clamps[0]?.sentence).toBe(
      'Outside the range of the source: conformation 14.0 on the fifteen-point scale is taken as 12.0.',
    );
    expect(composition('R', '4L').clamps).toEqual([]);
  });
});

describe('dressing percentages', () => {
  it('an AHDB R4L steer of 600 kg: 31 weighed rows that are no carcase, 318 kg of carcase, 53 %', () => {
    // AHDB Beef Yield Guide, table of everything that is not carcase.
    const rows = [
      42.49, 1.57, 14.54, 11.18, 4.49, 1.23, 1.12, 1.12, 2.23, 7.85, 2.24, 2.12, 1.12, 15.65, 11.18, 3.58, 1.11, 1.32,
      0.22, 0.34, 1.27, 0.54, 1.26, 1.55, 7.27, 20.13, 86.0, 6.91, 0.18, 13.42, 16.77,
    ];
    expect(rows).toHaveLength(31);
    const notCarcase = rows.reduce((sum, kg) => sum + Math.round(kg * 100), 0);
    expect(notCarcase).toBe(28_200);
    expect(60_000 - notCarcase).toBe(31_800);
    expect(Math.abs(percent(KILLING_OUT_PPHT.steer) - 53)).toBeLessThanOrEqual(1);
  });

  it('the defaults for prime cattle lie within one standard deviation of 18,479 Irish carcases', () => {
    // doi in PMC6447276: mean 55.86 %, standard deviation 3.21 points.
    for (const type of ['steer', 'heifer', 'young bull'] as const) {
      expect(Math.abs(percent(KILLING_OUT_PPHT[type]) - 55.86)).toBeLessThanOrEqual(3.21);
    }
  });

  it('breeds of one trial bracket the default of a steer', () => {
    // McGee, Keane et al. 2008, Grange: Holstein 50.9, Friesian 52.0, Charolais cross 54.5 %.
    const steer = percent(KILLING_OUT_PPHT.steer);
    expect(steer).toBeGreaterThan(50.9);
    expect(steer).toBeLessThan(54.5);
  });

  it('Hereford cross heifers as reported: 256 of 488 kg and 283 of 542 kg', () => {
    // Irish Farmers Journal, September 2022 (article 724440): 51.3 to 52.5 %; printed 52.4 and 52.1.
    expect(Math.abs((256 / 488) * 100 - 52.4)).toBeLessThan(0.1);
    expect(Math.abs((283 / 542) * 100 - 52.1)).toBeLessThan(0.15);
    expect(Math.abs(percent(KILLING_OUT_PPHT.heifer) - 52.3)).toBeLessThan(1);
  });
});
