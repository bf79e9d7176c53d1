import { describe, expect, it } from 'vitest';
import { compareCuts } from '#shared/engine/cutout/compare-cuts.ts';
import { weighByPacks } from '#shared/engine/cutout/packed-lines.ts';
import { cutCarcase, nodeAt } from '#tests/support/make-carcase-facts.ts';

const LEFT = 'left/hind/topside/topside-joint';
const RIGHT = 'right/hind/topside/topside-joint';
const NOTHING_WHOLE = new Set<string>();

describe('packs as the scales of a cutout', () => {
  it('of a cut that both sides give, are shared as it was foreseen', () => {
    const { nodes } = cutCarcase();
    const weighed = weighByPacks(nodes, { 'topside-joint': 20_001 }, NOTHING_WHOLE);
    const [left, right] = [LEFT, RIGHT].map((path) => weighed.find((node) => node.path === path));
    expect(left).toMatchObject({ grams: 10_001, source: 'weighed' });
    expect(right).toMatchObject({ grams: 10_000, source: 'weighed' });
    expect(left?.estimatedGrams).toBe(nodeAt({ ...cutCarcase(), nodes }, LEFT).estimatedGrams);
  });

  it('where one side was weighed as a line, count for the other side alone', () => {
    const { nodes } = cutCarcase({ measured: { [LEFT]: 9_000 } });
    const weighed = weighByPacks(nodes, { 'topside-joint': 19_500 }, NOTHING_WHOLE);
    expect(weighed.find(({ path }) => path === LEFT)?.grams).toBe(9_000);
    expect(weighed.find(({ path }) => path === RIGHT)).toMatchObject({ grams: 10_500, source: 'weighed' });
  });

  it('leave a primal that went out whole, trim, and a cut that nothing gives, as they were', () => {
    const { nodes } = cutCarcase();
    const packed = { 'topside-joint': 10_000, trim: 9_000, 'tri-tip': 800 };
    const weighed = weighByPacks(nodes, packed, new Set(['left/hind/topside']));
    const changed = weighed.filter((node, at) => node !== nodes[at]);
    expect(changed.map(({ path, grams }) => [path, grams])).toEqual([[RIGHT, 10_000]]);
  });

  it('less than what was weighed as lines, say nothing', () => {
    const { nodes } = cutCarcase({ measured: { [LEFT]: 9_000 } });
    expect(weighByPacks(nodes, { 'topside-joint': 8_000 }, NOTHING_WHOLE)).toEqual(nodes);
  });
});

describe('estimated against weighed by cut', () => {
  it('of two carcases pooled, adds up what each of them says, and leaves out what was not weighed', () => {
    const carcases = [9_500, 10_200].map((grams) => cutCarcase({ measured: { [LEFT]: grams } }).nodes);
    const pooled = compareCuts(...carcases);
    expect(pooled).toHaveLength(1);
    const each = carcases.map((nodes) => compareCuts(nodes)[0]);
    expect(pooled[0]).toEqual({
      id: 'topside-joint',
      name: 'Topside joint',
      lines: 2,
      estimatedGrams: each.reduce((sum, one) => sum + (one?.estimatedGrams ?? 0), 0),
      weighedGrams: 19_700,
    });
  });

  it('of a primal weighed before it was cut, shows the primal; of one whose lines were weighed, the lines', () => {
    const measured = { 'left/fore/brisket': 15_000, 'left/hind/topside': 14_000, [LEFT]: 9_500 };
    const rows = compareCuts(cutCarcase({ measured }).nodes);
    expect(rows.map(({ id, weighedGrams }) => [id, weighedGrams])).toEqual([
      ['primal:brisket', 15_000],
      ['topside-joint', 9_500],
    ]);
  });

  it('of nothing weighed, is empty', () => {
    expect(compareCuts(cutCarcase().nodes)).toEqual([]);
  });
});
