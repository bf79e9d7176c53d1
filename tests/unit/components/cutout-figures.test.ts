import { describe, expect, it } from 'vitest';
import { balanceOf } from '#components/carcases/mass-balance.ts';
import { changedWeights, differenceWords, weighableOf } from '#components/carcases/weight-difference.ts';
import type { CutoutNode } from '#shared/contracts/carcases.ts';

function node(path: string, more: Partial<CutoutNode>): CutoutNode {
  return {
    path,
    parentPath: path.includes('/') ? path.slice(0, path.lastIndexOf('/')) : null,
    level: 'line',
    kind: 'cut',
    name: path,
    grams: 0,
    source: 'estimated',
    estimatedGrams: 0,
    weighingDifferenceGrams: 0,
    ...more,
  };
}

const nodes: CutoutNode[] = [
  node('carcase', { level: 'carcase', kind: 'whole', grams: 10_000 }),
  node('left', { level: 'side', kind: 'whole', grams: 10_000 }),
  node('left/fore', { level: 'quarter', kind: 'whole', grams: 10_000 }),
  node('left/fore/brisket', { level: 'primal', kind: 'whole', grams: 10_000 }),
  node('left/fore/brisket/brisket-joint', { grams: 6_000 }),
  node('left/fore/brisket/trim', { kind: 'trim', grams: 1_500 }),
  node('left/fore/brisket/bone', { kind: 'bone', grams: 2_000 }),
  node('left/fore/brisket/loss', { kind: 'loss', grams: 480 }),
  node('right', { level: 'side', kind: 'whole' }),
];

describe('the balance of a cutout', () => {
  it('adds the lines up by kind and names what the scales disagree by', () => {
    const balance = balanceOf(nodes);
    expect(balance.wholeGrams).toBe(10_000);
    expect(balance.parts).toEqual([
      { kind: 'cut', grams: 6_000 },
      { kind: 'trim', grams: 1_500 },
      { kind: 'bone', grams: 2_000 },
      { kind: 'fat', grams: 0 },
      { kind: 'loss', grams: 480 },
    ]);
    expect(balance.differenceGrams).toBe(20);
  });
});

describe('entering weights', () => {
  it('offers the hung carcase and the parts of one side that a scale can weigh: no loss, not the other side', () => {
    expect(weighableOf(nodes, 'left').map(({ path }) => path)).toEqual([
      'hung',
      'left',
      'left/fore',
      'left/fore/brisket',
      'left/fore/brisket/brisket-joint',
      'left/fore/brisket/trim',
      'left/fore/brisket/bone',
    ]);
  });

  it('says by how much a weight differs from what was foreseen', () => {
    expect(differenceWords(12_700, 12_400)).toBe('0.300 kg more (2.4 %)');
    expect(differenceWords(12_000, 12_400)).toBe('0.400 kg less (3.2 %)');
    expect(differenceWords(12_400, 12_400)).toBe('as foreseen');
    expect(differenceWords(100, 0)).toBe('0.100 kg more');
    expect(differenceWords(null, 12_400)).toBe('');
    expect(differenceWords(Number.NaN, 12_400)).toBe('');
  });

  it('sends new, altered and taken back weights alone', () => {
    const before = [
      { path: 'left', grams: 160_000 },
      { path: 'left/fore', grams: null },
      { path: 'left/hind', grams: 80_000 },
    ];
    const now = [
      { path: 'left', grams: null },
      { path: 'left/fore', grams: 81_000 },
      { path: 'left/hind', grams: 80_000 },
    ];
    expect(changedWeights(before, now)).toEqual([
      { path: 'left', grams: null },
      { path: 'left/fore', grams: 81_000 },
    ]);
  });
});
