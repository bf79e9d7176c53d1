import { describe, expect, it } from 'vitest';
import { proposeCorrection, type CorrectionRow } from '#shared/engine/cutout/propose-correction.ts';
import { sidesOfCutout, type SideCut } from '#shared/engine/cutout/weighed-sides.ts';
import { checkSpecification } from '#shared/engine/figures/check-specification.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { cutCarcase } from '#tests/support/make-carcase-facts.ts';

/** Where a farm's cutter differs: 0.6 points more brisket at the cost of chuck, and a joint trimmed harder. */
function farmsOwn(): Specification {
  const own = structuredClone(traditionalSide);
  const primal = (id: string) => own.quarters[0].primals.find((one) => one.id === id);
  const [brisket, chuck] = [primal('brisket'), primal('chuck')];
  const rolled = own.choices.find(({ id }) => id === 'brisket')?.ways.find(({ id }) => id === 'rolled');
  const [joint, trim] = [rolled?.lines[0]?.takes[0], rolled?.lines[1]?.takes[0]];
  if (!brisket || !chuck || !joint || !trim) throw new Error('the specification has changed');
  brisket.tissues.meat += 600;
  chuck.tissues.meat -= 600;
  joint.meat -= 8_000;
  trim.meat += 8_000;
  return own;
}

const PRIMALS = ['left/fore/brisket', 'left/fore/chuck', 'right/fore/brisket', 'right/fore/chuck'];

/** Cuts sides as the farm does and weighs brisket and chuck with all their lines. */
function cutDays(carcases: number): SideCut[] {
  return Array.from({ length: carcases }, (_, at) => {
    const coldGrams = 300_000 + (at % 20) * 5_000;
    const truth = cutCarcase({ coldGrams }, { specification: farmsOwn() });
    const weighed = truth.nodes.filter(
      ({ path, parentPath }) => PRIMALS.includes(path) || PRIMALS.includes(parentPath ?? ''),
    );
    const measured = Object.fromEntries(weighed.map(({ path, grams }) => [path, grams]));
    return sidesOfCutout(`carcase-${at}`, cutCarcase({ coldGrams, measured }));
  }).flat();
}

function errorOf(specification: Specification): number {
  const truth = cutCarcase({}, { specification: farmsOwn() });
  const guess = new Map(cutCarcase({}, { specification }).nodes.map(({ path, grams }) => [path, grams]));
  const lines = truth.nodes.filter(({ parentPath }) => parentPath !== null && PRIMALS.includes(parentPath));
  return lines.reduce((sum, { path, grams }) => sum + Math.abs(grams - (guess.get(path) ?? 0)), 0);
}

describe('what the farm learns from its own scales', () => {
  it('from nothing weighed, proposes the specification as it is and says that it knows little', () => {
    const { specification, rows, caution, sides } = proposeCorrection(traditionalSide, cutDays(0));
    expect(specification).toEqual(traditionalSide);
    expect({ rows, sides }).toEqual({ rows: [], sides: 0 });
    expect(caution).toContain('fewer than three');
  });

  it('from one carcase, moves a quarter of the way (2 of 8 sides) and says so', () => {
    const { rows, caution } = proposeCorrection(traditionalSide, cutDays(1));
    const joint = rows.find(({ path }) => path === 'brisket/rolled/brisket-joint');
    expect(joint).toMatchObject({ sides: 2, isFromFewSides: true });
    const moved = (joint?.proposedPpht ?? 0) - 100_000;
    const seen = (joint?.seenPpht ?? 0) - 100_000;
    expect(Math.abs(moved - seen / 4)).toBeLessThanOrEqual(1);
    expect(caution).toBe('Only 2 sides were weighed: fewer than three say little about the next one.');
  });

  it('with more sides comes nearer to how the farm cuts, and always adds up', () => {
    const errors = [0, 1, 3, 10, 30].map((carcases) => {
      const { specification } = proposeCorrection(traditionalSide, cutDays(carcases));
      expect(() => checkSpecification(specification)).not.toThrow();
      return errorOf(specification);
    });
    for (const [at, error] of errors.slice(1).entries()) expect(error).toBeLessThan(errors[at] ?? 0);
    expect(errors.at(-1)).toBeLessThan((errors[0] ?? 0) * 0.15);
  });

  it('moves only what was weighed, but for bringing the whole back to 100 %', () => {
    const { specification, caution } = proposeCorrection(traditionalSide, cutDays(10));
    expect(caution).toBeNull();
    const shin = (of: Specification) => of.quarters[1].primals.find(({ id }) => id === 'hind-shin')?.tissues.meat ?? 0;
    expect(Math.abs(shin(specification) / shin(traditionalSide) - 1)).toBeLessThan(0.005);
    const untouched = (of: Specification) => of.choices.filter(({ id }) => id !== 'brisket' && id !== 'chuck');
    expect(untouched(specification)).toEqual(untouched(traditionalSide));
  });

  it('a heavy side that is cut as foreseen teaches nothing', () => {
    const facts = { measured: { hung: 352_000 }, coldGrams: 352_000 };
    const whole = cutCarcase(facts);
    const lines = whole.nodes.filter(({ parentPath }) => parentPath === 'left/fore/brisket');
    const measured = { ...facts.measured, ...Object.fromEntries(lines.map(({ path, grams }) => [path, grams])) };
    const { rows } = proposeCorrection(traditionalSide, sidesOfCutout('heavy', cutCarcase({ ...facts, measured })));
    for (const { seenPpht } of rows) expect(Math.abs(seenPpht - 100_000)).toBeLessThan(30);
  });

  it('in whatever order the sides come, proposes the same', () => {
    const history = cutDays(4);
    expect(proposeCorrection(traditionalSide, history.toReversed())).toEqual(
      proposeCorrection(traditionalSide, history),
    );
  });

  it('once it has learned from four sides, moves by 4 of 14 in place of 4 of 10', () => {
    const learned = new Map([['brisket/rolled/brisket-joint', 4]]);
    const joint = (rows: CorrectionRow[]) => rows.find(({ path }) => path === 'brisket/rolled/brisket-joint');
    const fresh = joint(proposeCorrection(traditionalSide, cutDays(2)).rows);
    const slower = joint(proposeCorrection(traditionalSide, cutDays(2), learned).rows);
    expect([fresh?.priorSides, slower?.priorSides]).toEqual([6, 10]);
    const seen = (fresh?.seenPpht ?? 0) - 100_000;
    expect(Math.abs((fresh?.proposedPpht ?? 0) - 100_000 - (seen * 4) / 10)).toBeLessThanOrEqual(1);
    expect(Math.abs((slower?.proposedPpht ?? 0) - 100_000 - (seen * 4) / 14)).toBeLessThanOrEqual(1);
  });

  it('of a way that shares its lines with another on one primal, teaches the way that was cut', () => {
    const path = 'left/hind/loin/sirloin-steak';
    const ways = { left: { 'loin-rump': 'steaks-rump-seamed' } };
    const foreseen = cutCarcase({}, { ways });
    const grams = foreseen.nodes.find((node) => node.path === path)?.grams ?? 0;
    const cut = cutCarcase({ measured: { [path]: Math.round(grams * 1.04) } }, { ways });
    const { rows } = proposeCorrection(traditionalSide, sidesOfCutout('steer', cut));
    expect(rows.map((row) => row.path)).toEqual(['loin/steaks-rump-seamed/sirloin-steak']);
  });
});
