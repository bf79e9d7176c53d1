import type { Choice, Cut } from './specification.ts';

type Group = Pick<Cut, 'kind' | 'cooking' | 'leanPpht' | 'isSoldLoose' | 'mayBeMinced' | 'useByDays'>;

/**
 * What cuts of one sort share. Use-by days and visual lean are common practice for vacuum packs kept below 5 °C: the
 * premises' own shelf-life study takes their place.
 */
const GROUPS = {
  steak: {
    kind: 'cut',
    cooking: 'grill',
    leanPpht: 92_000,
    isSoldLoose: true,
    mayBeMinced: false,
    useByDays: 10,
  },
  roast: {
    kind: 'cut',
    cooking: 'roast',
    leanPpht: 92_000,
    isSoldLoose: true,
    mayBeMinced: true,
    useByDays: 12,
  },
  onBone: {
    kind: 'cut',
    cooking: 'roast',
    leanPpht: 70_000,
    isSoldLoose: true,
    mayBeMinced: false,
    useByDays: 10,
  },
  potRoast: {
    kind: 'cut',
    cooking: 'pot-roast',
    leanPpht: 88_000,
    isSoldLoose: true,
    mayBeMinced: true,
    useByDays: 12,
  },
  braise: {
    kind: 'cut',
    cooking: 'braise',
    leanPpht: 90_000,
    isSoldLoose: true,
    mayBeMinced: true,
    useByDays: 8,
  },
  trim: {
    kind: 'trim',
    cooking: 'mince',
    leanPpht: 80_000,
    isSoldLoose: false,
    mayBeMinced: true,
    useByDays: 5,
  },
  mince: {
    kind: 'mince',
    cooking: 'mince',
    leanPpht: 85_000,
    isSoldLoose: true,
    mayBeMinced: false,
    useByDays: 5,
  },
} as const satisfies Record<string, Group>;

/** Lightest pack, heaviest pack, and the weight that a loose pack is paid for before it is weighed; grams. */
type Packs = readonly [min: number, max: number, upper: number];
/** Selling and clearance price, whole pounds and pence per kg. */
type Prices = readonly [price: number, clearance: number];

type Row = {
  id: string;
  name: string;
  primal: string | null;
  group: keyof typeof GROUPS;
  packs: Packs;
  prices: Prices;
  is: string;
  leanPpht?: number;
  /** Where a cut is cooked unlike the rest of its group. */
  cooking?: Cut['cooking'];
};

const TENTH_PENCE_PER_POUND = 1_000;

function toCut(row: Row): Cut {
  const [minPackGrams, maxPackGrams, upperLooseGrams] = row.packs;
  const [price, clearance] = row.prices;
  const { leanPpht, ...group } = GROUPS[row.group];
  return {
    id: row.id,
    name: row.name,
    description: row.is,
    primalId: row.primal,
    minPackGrams,
    maxPackGrams,
    upperLooseGrams,
    tenthPencePerKg: Math.round(price * TENTH_PENCE_PER_POUND),
    clearanceTenthPencePerKg: Math.round(clearance * TENTH_PENCE_PER_POUND),
    leanPpht: row.leanPpht ?? leanPpht,
    ...group,
    cooking: row.cooking ?? group.cooking,
  };
}

/**
 * Cuts of the British counter. Pack weights follow the portions of common practice (steaks of about 227 g by the pair,
 * fillet of 170 g, dice and mince of 400 to 500 g, joints of 1 to 2 kg). Prices are starting values for a farm to set.
 */
// prettier-ignore
const ROWS: readonly Row[] = [
  { id: 'fillet-steak', name: 'Fillet steak', primal: 'loin', group: 'steak', packs: [300, 420, 420], prices: [54, 22], is: 'Two thick steaks from the tenderest muscle.', leanPpht: 96_000 },
  { id: 'sirloin-steak', name: 'Sirloin steak', primal: 'loin', group: 'steak', packs: [400, 560, 560], prices: [35, 14], is: 'Two steaks with their rim of fat.' },
  { id: 't-bone-steak', name: 'T-bone steak', primal: 'loin', group: 'onBone', packs: [550, 850, 850], prices: [34, 13], is: 'Sirloin and fillet on either side of one bone.', cooking: 'grill' },
  { id: 'sirloin-on-the-bone', name: 'Sirloin on the bone', primal: 'loin', group: 'onBone', packs: [1_500, 3_000, 2_600], prices: [27, 11], is: 'A carving joint for a full table.' },
  { id: 'sirloin-joint', name: 'Sirloin joint, rolled', primal: 'loin', group: 'roast', packs: [1_000, 2_000, 2_000], prices: [33, 13], is: 'Boned, rolled and tied.' },
  { id: 'rump-steak', name: 'Rump steak', primal: 'rump', group: 'steak', packs: [400, 600, 600], prices: [25, 10], is: 'Two steaks with a firmer bite and more taste.' },
  { id: 'rump-heart-steak', name: 'Heart of rump', primal: 'rump', group: 'steak', packs: [350, 520, 520], prices: [28, 11], is: 'The round middle muscle of the rump, trimmed.', leanPpht: 96_000 },
  { id: 'rump-cap', name: 'Rump cap', primal: 'rump', group: 'roast', packs: [700, 1_300, 1_300], prices: [27, 10], is: 'The cap under its fat, to roast whole or slice for the grill.', leanPpht: 82_000 },
  { id: 'bistro-rump', name: 'Bistro rump', primal: 'rump', group: 'steak', packs: [350, 520, 520], prices: [23, 9], is: 'The small muscle beside the heart, for a hot pan.' },
  { id: 'fore-rib', name: 'Fore rib on the bone', primal: 'fore-rib', group: 'onBone', packs: [1_500, 3_000, 2_600], prices: [25, 10], is: 'Two ribs or more, the roast of a feast day.' },
  { id: 'fore-rib-chined', name: 'Fore rib, chined', primal: 'fore-rib', group: 'onBone', packs: [1_400, 2_800, 2_400], prices: [26, 10], is: 'On its ribs, with the backbone taken off.' },
  { id: 'rib-rolled', name: 'Rib, boned and rolled', primal: 'fore-rib', group: 'roast', packs: [1_000, 2_200, 2_200], prices: [28, 10], is: 'All the taste of the rib, easy to carve.', leanPpht: 80_000 },
  { id: 'rib-eye-steak', name: 'Rib-eye steak', primal: 'fore-rib', group: 'steak', packs: [400, 560, 560], prices: [37, 14], is: 'Two marbled steaks from the middle of the rib.', leanPpht: 85_000 },
  { id: 'cote-de-boeuf', name: 'Côte de boeuf', primal: 'fore-rib', group: 'onBone', packs: [800, 1_300, 1_300], prices: [31, 12], is: 'One thick rib for two.', cooking: 'grill' },
  { id: 'topside-joint', name: 'Topside joint', primal: 'topside', group: 'roast', packs: [1_000, 2_000, 2_000], prices: [16.8, 8], is: 'The lean Sunday roast, rolled and tied.', leanPpht: 95_000 },
  { id: 'minute-steak', name: 'Minute steak', primal: 'topside', group: 'steak', packs: [300, 450, 450], prices: [18.5, 8], is: 'Thin slices of topside for a very hot pan.', leanPpht: 97_000 },
  { id: 'top-rump-joint', name: 'Top rump joint', primal: 'thick-flank', group: 'roast', packs: [900, 1_800, 1_800], prices: [15.8, 7.5], is: 'A small lean roast from the thick flank.', leanPpht: 95_000 },
  { id: 'stir-fry-strips', name: 'Stir-fry strips', primal: 'thick-flank', group: 'steak', packs: [350, 500, 500], prices: [17.5, 7.5], is: 'Cut across the grain, ready for the wok.', leanPpht: 96_000 },
  { id: 'silverside-joint', name: 'Silverside joint', primal: 'silverside', group: 'potRoast', packs: [1_000, 2_000, 2_000], prices: [15.5, 7.5], is: 'Cook slowly with a little stock.', leanPpht: 95_000 },
  { id: 'salmon-cut-joint', name: 'Salmon cut', primal: 'silverside', group: 'roast', packs: [700, 1_500, 1_500], prices: [17, 8], is: 'A neat round joint for a small household.', leanPpht: 96_000 },
  { id: 'braising-slices', name: 'Braising slices', primal: 'silverside', group: 'braise', packs: [400, 550, 550], prices: [14.8, 7], is: 'Lean slices of silverside.', leanPpht: 95_000 },
  { id: 'bavette', name: 'Bavette', primal: 'flank', group: 'steak', packs: [300, 480, 480], prices: [24, 8], is: 'Loose-grained and full of taste; serve it pink.' },
  { id: 'tri-tip', name: 'Tri-tip', primal: 'thick-flank', group: 'roast', packs: [600, 1_200, 1_200], prices: [22, 9], is: 'The three-cornered muscle above the thick flank, for grill or oven.', leanPpht: 90_000 },
  { id: 'thick-flank-steak', name: 'Thick flank steak', primal: 'thick-flank', group: 'steak', packs: [350, 520, 520], prices: [18, 8], is: 'The round middle of the thick flank, cut thin.', leanPpht: 96_000 },
  { id: 'topside-bullet', name: 'Topside bullet', primal: 'topside', group: 'roast', packs: [800, 1_800, 1_800], prices: [18.5, 8], is: 'The heart of the topside with its cap taken off.', leanPpht: 96_000 },
  { id: 'flank-steak', name: 'Flank steak', primal: 'flank', group: 'steak', packs: [400, 800, 800], prices: [20, 8], is: 'One flat muscle; slice it across the grain.', leanPpht: 93_000 },
  { id: 'short-rib', name: 'Short ribs', primal: 'brisket', group: 'braise', packs: [700, 1_400, 1_400], prices: [14.5, 5], is: 'Thick ends of the ribs, for half a day in the oven.', leanPpht: 50_000 },
  { id: 'chuck-eye-steak', name: 'Chuck eye steak', primal: 'chuck-eye', group: 'steak', packs: [350, 520, 520], prices: [22, 8], is: 'Where the rib-eye runs into the shoulder.', leanPpht: 85_000 },
  { id: 'shoulder-tender', name: 'Shoulder tender', primal: 'leg-of-mutton', group: 'steak', packs: [250, 450, 450], prices: [27, 8], is: 'A small round muscle almost as tender as fillet.', leanPpht: 95_000 },
  { id: 'shoulder-heart-steak', name: 'Shoulder heart steak', primal: 'leg-of-mutton', group: 'steak', packs: [350, 520, 520], prices: [18, 7], is: 'Lean steaks from the middle of the leg of mutton cut.', leanPpht: 94_000 },
  { id: 'brisket-joint', name: 'Brisket, boned and rolled', primal: 'brisket', group: 'potRoast', packs: [1_000, 2_000, 2_000], prices: [13.2, 6], is: 'Three slow hours and it falls apart.', leanPpht: 80_000 },
  { id: 'brisket-on-the-bone', name: 'Brisket on the bone', primal: 'brisket', group: 'onBone', packs: [1_500, 3_500, 3_000], prices: [9.8, 4.5], is: 'For the smoker or a long pot.', leanPpht: 62_000 },
  { id: 'braising-steak', name: 'Braising steak', primal: 'chuck', group: 'braise', packs: [400, 550, 550], prices: [14.2, 6.5], is: 'Chuck in thick slices.' },
  { id: 'diced-beef', name: 'Diced beef', primal: 'chuck', group: 'braise', packs: [400, 550, 550], prices: [13.6, 6.5], is: 'Trimmed dice for stews and pies.' },
  { id: 'denver-steak', name: 'Denver steak', primal: 'chuck', group: 'steak', packs: [350, 500, 500], prices: [26, 8], is: 'The tender muscle under the shoulder blade.', leanPpht: 86_000 },
  { id: 'feather-steak', name: 'Feather steak', primal: 'blade', group: 'braise', packs: [350, 500, 500], prices: [15.8, 7], is: 'Slices of blade that melt when braised.' },
  { id: 'flat-iron-steak', name: 'Flat iron steak', primal: 'blade', group: 'steak', packs: [350, 500, 500], prices: [24, 8], is: 'The blade muscle taken off its sinew.' },
  { id: 'blade-joint', name: 'Blade joint', primal: 'blade', group: 'potRoast', packs: [1_000, 1_800, 1_800], prices: [13.8, 6.5], is: 'Whole blade for the slow oven.' },
  { id: 'leg-of-mutton-joint', name: 'Leg of mutton cut', primal: 'leg-of-mutton', group: 'potRoast', packs: [1_000, 1_800, 1_800], prices: [13.4, 6.5], is: 'A lean shoulder joint for the pot.', leanPpht: 93_000 },
  { id: 'shin-slices', name: 'Shin, boneless', primal: 'hind-shin', group: 'braise', packs: [400, 600, 600], prices: [13, 6], is: 'Rich slices for the longest stew.' },
  { id: 'shin-on-the-bone', name: 'Shin on the bone', primal: 'hind-shin', group: 'braise', packs: [600, 900, 900], prices: [9.5, 4.5], is: 'Slices round the marrow bone.', leanPpht: 52_000 },
  { id: 'lean-trim', name: 'Lean trim', primal: null, group: 'trim', packs: [1_000, 10_000, 5_000], prices: [8, 5.4], is: 'Trim of visual lean about 95 %.', leanPpht: 95_000 },
  { id: 'trim', name: 'Trim', primal: null, group: 'trim', packs: [1_000, 10_000, 5_000], prices: [6.5, 4.2], is: 'Trim of visual lean about 80 %.' },
  { id: 'mince', name: 'Mince', primal: null, group: 'mince', packs: [400, 550, 550], prices: [11.2, 5.2], is: 'Coarse mince of the whole animal.' },
];

const CUTS: ReadonlyMap<string, Cut> = new Map(ROWS.map((row) => [row.id, toCut(row)]));

/** The cuts named, in the order of the counter: steaks first, mince last. */
export function britishCuts(ids: ReadonlySet<string>): Cut[] {
  return [...CUTS.values()].filter((cut) => ids.has(cut.id));
}

/** Every cut and trim that these choices can make, and mince, which is made of trim afterwards. */
export function cutsOf(choices: readonly Choice[]): Cut[] {
  const lines = choices.flatMap(({ ways }) => ways.flatMap((way) => way.lines));
  return britishCuts(new Set([...lines.map(({ id }) => id), 'mince']));
}
