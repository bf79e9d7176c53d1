import type { AllocationInput, BoxVariant, RecipeLine } from '#shared/engine/allocation/allocation-input.ts';
import type { CarcaseFacts } from '#shared/engine/cutout/cutout-types.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { cutCarcase } from './make-carcase-facts.ts';

const STEAKS = ['sirloin-steak', 'rump-steak', 'rib-eye-steak', 'fillet-steak', 'rump-heart-steak', 'bistro-rump'];
const ROASTS = ['topside-joint', 'silverside-joint', 'top-rump-joint', 'salmon-cut-joint'];
const SLOW = ['braising-steak', 'diced-beef', 'feather-steak', 'shin-slices', 'leg-of-mutton-joint', 'brisket-joint'];

function line(id: string, cutIds: string[], grams: readonly [least: number, most: number]): RecipeLine {
  const [minGrams, maxGrams] = grams;
  return { id, name: id, cutIds, minGrams, maxGrams, minPacks: 1, maxPacks: null, state: 'either' };
}

export function makeBox(more: Partial<BoxVariant> & Pick<BoxVariant, 'id'>): BoxVariant {
  return {
    kindId: more.id,
    name: more.id,
    pricePence: 14_500,
    packagingPence: 450,
    guaranteedGrams: 10_000,
    floor: 0,
    priority: 2,
    steps: [{ boxes: 40, valuePence: 14_500 }],
    lines: [
      line('steaks', STEAKS, [1_600, 2_400]),
      line('roasts', ROASTS, [2_000, 3_400]),
      line('slow', SLOW, [2_200, 3_800]),
      line('mince', ['mince'], [2_000, 4_000]),
    ],
    ...more,
  };
}

/** Two R4L carcases and two kinds of box that share their steaks; every loose cut sells at its price. */
export function makeAllocationInput(
  more: Partial<AllocationInput> = {},
  carcases: readonly Partial<CarcaseFacts>[] = [{ id: 'one' }, { id: 'two' }],
): AllocationInput {
  const { cuts } = traditionalSide;
  return {
    sides: carcases.flatMap((facts) => cutCarcase(facts).sides),
    cuts,
    stock: [],
    boxes: [
      makeBox({ id: 'everyday' }),
      makeBox({
        id: 'grill',
        pricePence: 12_000,
        guaranteedGrams: 4_000,
        steps: [{ boxes: 8, valuePence: 12_000 }],
        lines: [line('steaks', STEAKS, [2_400, 3_200]), line('mince', ['mince'], [1_200, 2_000])],
      }),
    ],
    loose: [{ cutId: 'mince', floor: 0, priority: 2, steps: [{ packs: 20, tenthPencePerKg: 11_200 }] }],
    trade: [],
    mince: {
      closedReason: null,
      productCutId: 'mince',
      minLeanPpht: 82_000,
      costTenthPencePerKg: 700,
      allowedCutIds: cuts.filter((cut) => cut.mayBeMinced).map(({ id }) => id),
    },
    locks: [],
    packingTenthPencePerKg: 600,
    ...more,
  };
}
