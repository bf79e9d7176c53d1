/** The five boxes that a farm starts with and one swap: a natural mix of the side between them. Weights in grams, money in pence. */

type LineLimits = readonly [minGrams: number, maxGrams: number, minPacks: number, maxPacks: number | null];

export type StartingBox = {
  slug: string;
  name: string;
  summary: string;
  guaranteedGrams: number;
  pricePence: number;
  packagingPence: number;
  demandBoxes: number;
  /** The slug of the box that this is a swap of. */
  variantOf?: string;
  lines: { name: string; limits: LineLimits; cutIds: readonly string[] }[];
};

const COUNTER_STEAKS = [
  'rump-steak',
  'rump-heart-steak',
  'bistro-rump',
  'bavette',
  'flat-iron-steak',
  'denver-steak',
  'minute-steak',
];
const PRIME_STEAKS = ['fillet-steak', 'sirloin-steak', 'rib-eye-steak', 't-bone-steak', 'cote-de-boeuf'];
const PRIME_ROASTS = ['fore-rib', 'fore-rib-chined', 'rib-rolled', 'sirloin-joint', 'sirloin-on-the-bone', 'rump-cap'];
const LEAN_ROASTS = ['topside-joint', 'top-rump-joint', 'salmon-cut-joint', 'silverside-joint'];
const POT_ROASTS = ['blade-joint', 'leg-of-mutton-joint', 'silverside-joint'];
const BRISKETS = ['brisket-joint', 'brisket-on-the-bone'];
const STEWS = ['braising-steak', 'diced-beef', 'feather-steak', 'braising-slices'];
const SHIN = ['shin-slices', 'shin-on-the-bone'];
const QUICK = ['stir-fry-strips', 'minute-steak', 'rump-steak', 'bavette', 'sirloin-steak', 'rib-eye-steak'];

export const STARTING_BOXES: readonly StartingBox[] = [
  {
    slug: 'hearth-5',
    name: 'Hearth, 5 kg',
    summary: 'The everyday mix: mince, stew, a joint and steaks.',
    guaranteedGrams: 5_000,
    pricePence: 7_600,
    packagingPence: 290,
    demandBoxes: 11,
    lines: [
      { name: 'Mince', limits: [1_200, 1_650, 3, 3], cutIds: ['mince'] },
      { name: 'For the stew', limits: [800, 1_100, 2, 2], cutIds: STEWS },
      { name: 'A roasting joint', limits: [900, 1_800, 1, 1], cutIds: LEAN_ROASTS },
      {
        name: 'Steaks for the week',
        limits: [700, 1_600, 2, 3],
        cutIds: [...QUICK, 'rump-heart-steak', 'bistro-rump'],
      },
    ],
  },
  {
    slug: 'hearth-5-no-stew',
    variantOf: 'hearth-5',
    name: 'Hearth, 5 kg, no stew',
    summary: 'Two more packs of mince in place of the stew.',
    guaranteedGrams: 5_000,
    pricePence: 7_600,
    packagingPence: 290,
    demandBoxes: 2,
    lines: [
      { name: 'Mince', limits: [2_000, 2_750, 5, 5], cutIds: ['mince'] },
      { name: 'A roasting joint', limits: [900, 1_800, 1, 1], cutIds: LEAN_ROASTS },
      {
        name: 'Steaks for the week',
        limits: [700, 1_600, 2, 3],
        cutIds: [...QUICK, 'rump-heart-steak', 'bistro-rump'],
      },
    ],
  },
  {
    slug: 'hearth-10',
    name: 'Hearth, 10 kg',
    summary: 'Twice the everyday mix, with a joint for the slow oven.',
    guaranteedGrams: 10_000,
    pricePence: 14_800,
    packagingPence: 420,
    demandBoxes: 5,
    lines: [
      { name: 'Mince', limits: [2_400, 3_300, 6, 6], cutIds: ['mince'] },
      { name: 'For the stew', limits: [1_600, 2_200, 4, 4], cutIds: STEWS },
      { name: 'Roasting joints', limits: [1_800, 3_600, 2, 2], cutIds: LEAN_ROASTS },
      { name: 'For the slow oven', limits: [1_000, 2_000, 1, 1], cutIds: POT_ROASTS },
      {
        name: 'Steaks for a fortnight',
        limits: [1_400, 3_000, 4, 6],
        cutIds: [...QUICK, 'rump-heart-steak', 'bistro-rump'],
      },
    ],
  },
  {
    slug: 'table',
    name: 'Table, 6 kg',
    summary: 'Roasts for a full table, from the rib to the topside.',
    guaranteedGrams: 6_000,
    pricePence: 11_900,
    packagingPence: 340,
    demandBoxes: 8,
    lines: [
      { name: 'The great roast', limits: [1_200, 2_800, 1, 2], cutIds: PRIME_ROASTS },
      { name: 'Lean roasts', limits: [1_600, 3_400, 1, 2], cutIds: LEAN_ROASTS },
      { name: 'For the slow oven', limits: [1_000, 2_600, 1, 2], cutIds: POT_ROASTS },
    ],
  },
  {
    slug: 'ember',
    name: 'Ember, 4 kg',
    summary: 'Steaks and coarse mince for the grill.',
    guaranteedGrams: 4_000,
    pricePence: 9_800,
    packagingPence: 290,
    demandBoxes: 9,
    lines: [
      { name: 'Prime steaks', limits: [1_000, 2_000, 2, 4], cutIds: PRIME_STEAKS },
      { name: 'Counter steaks', limits: [1_000, 2_000, 3, 5], cutIds: COUNTER_STEAKS },
      { name: 'Coarse mince for burgers', limits: [800, 1_100, 2, 2], cutIds: ['mince'] },
    ],
  },
  {
    slug: 'long-oven',
    name: 'Long Oven, 5 kg',
    summary: 'Shin, brisket and braising cuts that ask for three slow hours.',
    guaranteedGrams: 5_000,
    pricePence: 6_400,
    packagingPence: 290,
    demandBoxes: 7,
    lines: [
      { name: 'Braising cuts', limits: [1_200, 2_200, 3, 4], cutIds: STEWS },
      { name: 'Shin', limits: [400, 1_200, 1, 2], cutIds: SHIN },
      {
        name: 'A pot roast',
        limits: [1_000, 2_600, 1, 2],
        cutIds: [...BRISKETS, 'blade-joint', 'leg-of-mutton-joint'],
      },
      { name: 'Mince', limits: [800, 1_100, 2, 2], cutIds: ['mince'] },
    ],
  },
];

/** Cuts that are also sold by the single pack, and how many packs of each a cutting day is expected to sell. */
export const LOOSE_CUTS: Readonly<Record<string, number>> = {
  'fillet-steak': 12,
  'sirloin-steak': 10,
  'rib-eye-steak': 10,
  'rump-steak': 10,
  'fore-rib': 4,
  'topside-joint': 6,
  'brisket-joint': 6,
  'braising-steak': 12,
  'diced-beef': 14,
  'shin-on-the-bone': 12,
  bavette: 6,
  mince: 70,
};
