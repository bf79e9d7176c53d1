import { hindShinChoice } from './fore-choices.ts';
import type { Choice } from './specification.ts';
import { buildWay, type Portion, type WayRecipe } from './way-builder.ts';

/**
 * How the primals of a hindquarter may be cut. Shares are common practice: sirloin and rump give about 90 % steak, fillet
 * 83 % (its chain and ends go to trim), joints 95 to 97 %. By meat the loin is 75.85 % sirloin and 24.15 % body of the
 * fillet, the rump 90.49 % rump and 9.51 % head of the fillet, as in the reference side.
 */

export const flankChoice: Choice = {
  id: 'flank',
  name: 'Flank',
  primalIds: ['flank'],
  ways: [
    buildWay(['flank'], {
      id: 'bavette',
      name: 'Bavette, the rest for mince',
      extraTenthPencePerKg: 100,
      cuts: { bavette: { flank: { meat: 9_500 } }, trim: { flank: { meat: 87_500 } } },
      trimmedOff: { flank: 3_000 },
    }),
    buildWay(['flank'], {
      id: 'trim',
      name: 'All for mince',
      cuts: { trim: { flank: { meat: 97_500 } } },
      trimmedOff: { flank: 2_500 },
    }),
  ],
};

type Parts = {
  cuts: Record<string, Portion>;
  trim: number;
  off: number;
  name: string;
  extra: number;
  keepsVertebrae?: boolean;
};

const LOIN = {
  steaks: {
    name: 'Sirloin and fillet steaks',
    cuts: { 'sirloin-steak': { meat: 68_260 }, 'fillet-steak': { meat: 20_050 } },
    trim: 8_450,
    off: 3_240,
    extra: 300,
  },
  't-bone': {
    name: 'T-bone steaks',
    cuts: { 't-bone-steak': { meat: 93_000, bone: 75_000, fat: 60_000 } },
    trim: 5_000,
    off: 2_000,
    extra: 200,
    keepsVertebrae: true,
  },
  'bone-in': {
    name: 'Sirloin on the bone, fillet steaks',
    cuts: {
      'sirloin-on-the-bone': { meat: 73_570, bone: 80_000, fat: 55_000 },
      'fillet-steak': { meat: 20_050 },
    },
    trim: 5_410,
    off: 970,
    extra: 150,
    keepsVertebrae: true,
  },
  joint: {
    name: 'Sirloin rolled, fillet steaks',
    cuts: { 'sirloin-joint': { meat: 72_060, fat: 25_000 }, 'fillet-steak': { meat: 20_050 } },
    trim: 6_920,
    off: 970,
    extra: 250,
  },
} as const satisfies Record<string, Parts>;

const RUMP = {
  steaks: {
    name: 'rump steaks',
    cuts: { 'rump-steak': { meat: 81_440 }, 'fillet-steak': { meat: 7_890 } },
    trim: 7_570,
    off: 3_100,
    extra: 250,
  },
  seamed: {
    name: 'rump in its muscles',
    cuts: {
      'rump-heart-steak': { meat: 45_250 },
      'rump-cap': { meat: 14_480, fat: 30_000 },
      'bistro-rump': { meat: 19_910 },
      'fillet-steak': { meat: 7_890 },
    },
    trim: 9_380,
    off: 3_090,
    extra: 450,
  },
} as const satisfies Record<string, Parts>;

function loinRumpWay(loin: keyof typeof LOIN, rump: keyof typeof RUMP) {
  const fore: Parts = LOIN[loin];
  const hind: Parts = RUMP[rump];
  const cuts: Record<string, Record<string, Portion>> = {};
  const put = (primalId: string, parts: Parts) => {
    for (const [cutId, portion] of Object.entries({ ...parts.cuts, 'lean-trim': { meat: parts.trim } })) {
      cuts[cutId] = { ...cuts[cutId], [primalId]: portion };
    }
  };
  put('loin', fore);
  put('rump', hind);
  const recipe: WayRecipe = {
    id: `${loin}-rump-${rump}`,
    name: `${fore.name}, ${hind.name}`,
    keepsVertebrae: fore.keepsVertebrae ?? false,
    extraTenthPencePerKg: Math.round((fore.extra + hind.extra) / 2),
    cuts,
    trimmedOff: { loin: fore.off, rump: hind.off },
  };
  return buildWay(['loin', 'rump'], recipe);
}

/** Loin and rump are one choice: the fillet's body lies in the loin and its head in the rump, and a T-bone takes the body. */
export const loinRumpChoice: Choice = {
  id: 'loin-rump',
  name: 'Loin and rump',
  primalIds: ['loin', 'rump'],
  ways: (['steaks', 'seamed'] as const).flatMap((rump) =>
    (['steaks', 't-bone', 'bone-in', 'joint'] as const).map((loin) => loinRumpWay(loin, rump)),
  ),
};

export const thickFlankChoice: Choice = {
  id: 'thick-flank',
  name: 'Thick flank',
  primalIds: ['thick-flank'],
  ways: [
    buildWay(['thick-flank'], {
      id: 'joint',
      name: 'Top rump joints',
      cuts: { 'top-rump-joint': { 'thick-flank': { meat: 94_000 } }, 'lean-trim': { 'thick-flank': { meat: 6_000 } } },
    }),
    buildWay(['thick-flank'], {
      id: 'stir-fry',
      name: 'Stir-fry strips',
      extraTenthPencePerKg: 500,
      cuts: {
        'stir-fry-strips': { 'thick-flank': { meat: 84_000 } },
        'lean-trim': { 'thick-flank': { meat: 15_000 } },
      },
      trimmedOff: { 'thick-flank': 1_000 },
    }),
    buildWay(['thick-flank'], {
      id: 'diced',
      name: 'Dice',
      extraTenthPencePerKg: 250,
      cuts: { 'diced-beef': { 'thick-flank': { meat: 92_000 } }, 'lean-trim': { 'thick-flank': { meat: 8_000 } } },
    }),
  ],
};

export const topsideChoice: Choice = {
  id: 'topside',
  name: 'Topside',
  primalIds: ['topside'],
  ways: [
    buildWay(['topside'], {
      id: 'joint',
      name: 'Topside joints',
      cuts: { 'topside-joint': { topside: { meat: 95_000, fat: 20_000 } }, 'lean-trim': { topside: { meat: 5_000 } } },
    }),
    buildWay(['topside'], {
      id: 'minute-steak',
      name: 'Minute steaks',
      extraTenthPencePerKg: 350,
      cuts: { 'minute-steak': { topside: { meat: 85_000 } }, 'lean-trim': { topside: { meat: 14_000 } } },
      trimmedOff: { topside: 1_000 },
    }),
    buildWay(['topside'], {
      id: 'trim',
      name: 'Lean mince',
      cuts: { 'lean-trim': { topside: { meat: 98_500 } } },
      trimmedOff: { topside: 1_500 },
    }),
  ],
};

/** The salmon cut is 28.61 % of the meat of the silverside primal. */
export const silversideChoice: Choice = {
  id: 'silverside',
  name: 'Silverside',
  primalIds: ['silverside'],
  ways: [
    buildWay(['silverside'], {
      id: 'joint',
      name: 'Silverside and salmon cut joints',
      cuts: {
        'silverside-joint': { silverside: { meat: 68_000, fat: 15_000 } },
        'salmon-cut-joint': { silverside: { meat: 27_500 } },
        'lean-trim': { silverside: { meat: 4_500 } },
      },
    }),
    buildWay(['silverside'], {
      id: 'slices',
      name: 'Braising slices, salmon cut joint',
      extraTenthPencePerKg: 250,
      cuts: {
        'braising-slices': { silverside: { meat: 64_000 } },
        'salmon-cut-joint': { silverside: { meat: 27_500 } },
        'lean-trim': { silverside: { meat: 7_500 } },
      },
      trimmedOff: { silverside: 1_000 },
    }),
    buildWay(['silverside'], {
      id: 'trim',
      name: 'Lean mince',
      cuts: { 'lean-trim': { silverside: { meat: 98_500 } } },
      trimmedOff: { silverside: 1_500 },
    }),
  ],
};

export const hindChoices: readonly Choice[] = [
  flankChoice,
  loinRumpChoice,
  thickFlankChoice,
  topsideChoice,
  silversideChoice,
  hindShinChoice,
];
