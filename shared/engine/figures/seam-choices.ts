import { foreRibChoice, foreShinChoice, hindShinChoice } from './fore-choices.ts';
import { loinRumpChoice, silversideChoice } from './hind-choices.ts';
import type { Choice } from './specification.ts';
import { buildWay } from './way-builder.ts';

/**
 * Muscles taken apart along their seams, so that more of the side is steak and less is dice. Shares are common practice: a
 * denver of 0.6 to 0.9 kg a side, a bavette of 0.5 to 0.7 kg, a shoulder tender of about 0.35 kg.
 */

const neckChoice: Choice = {
  id: 'neck',
  name: 'Neck',
  primalIds: ['neck'],
  ways: [
    buildWay(['neck'], {
      id: 'diced',
      name: 'Dice',
      cuts: { 'diced-beef': { neck: { meat: 45_000 } }, trim: { neck: { meat: 54_000 } } },
      trimmedOff: { neck: 1_000 },
    }),
    buildWay(['neck'], {
      id: 'trim',
      name: 'All for mince',
      cuts: { trim: { neck: { meat: 98_000 } } },
      trimmedOff: { neck: 2_000 },
    }),
  ],
};

const chuckEyeChoice: Choice = {
  id: 'chuck-eye',
  name: 'Chuck eye',
  primalIds: ['chuck-eye'],
  ways: [
    buildWay(['chuck-eye'], {
      id: 'seamed',
      name: 'Chuck eye and denver steaks',
      extraTenthPencePerKg: 550,
      cuts: {
        'chuck-eye-steak': { 'chuck-eye': { meat: 14_000 } },
        'denver-steak': { 'chuck-eye': { meat: 6_000 } },
        'braising-steak': { 'chuck-eye': { meat: 42_000 } },
        trim: { 'chuck-eye': { meat: 37_000 } },
      },
      trimmedOff: { 'chuck-eye': 1_000 },
    }),
    buildWay(['chuck-eye'], {
      id: 'braising',
      name: 'Braising steak and dice',
      extraTenthPencePerKg: 200,
      cuts: {
        'braising-steak': { 'chuck-eye': { meat: 45_000 } },
        'diced-beef': { 'chuck-eye': { meat: 27_000 } },
        trim: { 'chuck-eye': { meat: 27_000 } },
      },
      trimmedOff: { 'chuck-eye': 1_000 },
    }),
  ],
};

const bladeChoice: Choice = {
  id: 'blade',
  name: 'Blade',
  primalIds: ['blade'],
  ways: [
    buildWay(['blade'], {
      id: 'flat-iron',
      name: 'Flat iron steaks and dice',
      extraTenthPencePerKg: 450,
      cuts: {
        'flat-iron-steak': { blade: { meat: 36_000 } },
        'diced-beef': { blade: { meat: 40_000 } },
        trim: { blade: { meat: 21_000 } },
      },
      trimmedOff: { blade: 3_000 },
    }),
    buildWay(['blade'], {
      id: 'feather',
      name: 'Feather steaks and dice',
      extraTenthPencePerKg: 250,
      cuts: {
        'feather-steak': { blade: { meat: 45_000 } },
        'diced-beef': { blade: { meat: 42_000 } },
        trim: { blade: { meat: 12_000 } },
      },
      trimmedOff: { blade: 1_000 },
    }),
  ],
};

const shoulderChoice: Choice = {
  id: 'leg-of-mutton',
  name: 'Leg of mutton cut',
  primalIds: ['leg-of-mutton'],
  ways: [
    buildWay(['leg-of-mutton'], {
      id: 'seamed',
      name: 'Shoulder tender, heart steaks and dice',
      extraTenthPencePerKg: 500,
      cuts: {
        'shoulder-tender': { 'leg-of-mutton': { meat: 2_600 } },
        'shoulder-heart-steak': { 'leg-of-mutton': { meat: 30_000 } },
        'diced-beef': { 'leg-of-mutton': { meat: 28_000 } },
        trim: { 'leg-of-mutton': { meat: 38_400 } },
      },
      trimmedOff: { 'leg-of-mutton': 1_000 },
    }),
    buildWay(['leg-of-mutton'], {
      id: 'joint',
      name: 'Joints and dice',
      extraTenthPencePerKg: 100,
      cuts: {
        'leg-of-mutton-joint': { 'leg-of-mutton': { meat: 38_000 } },
        'diced-beef': { 'leg-of-mutton': { meat: 27_000 } },
        trim: { 'leg-of-mutton': { meat: 35_000 } },
      },
    }),
  ],
};

const brisketChoice: Choice = {
  id: 'brisket',
  name: 'Brisket',
  primalIds: ['brisket'],
  ways: [
    buildWay(['brisket'], {
      id: 'short-rib',
      name: 'Short ribs and rolled brisket',
      extraTenthPencePerKg: 250,
      cuts: {
        'short-rib': { brisket: { meat: 22_000, bone: 35_000, fat: 6_000 } },
        'brisket-joint': { brisket: { meat: 66_000 } },
        trim: { brisket: { meat: 12_000 } },
      },
    }),
    buildWay(['brisket'], {
      id: 'rolled',
      name: 'Boned and rolled',
      extraTenthPencePerKg: 150,
      cuts: { 'brisket-joint': { brisket: { meat: 90_000 } }, trim: { brisket: { meat: 10_000 } } },
    }),
  ],
};

const flankChoice: Choice = {
  id: 'flank',
  name: 'Flank',
  primalIds: ['flank'],
  ways: [
    buildWay(['flank'], {
      id: 'seamed',
      name: 'Bavette and flank steak, the rest for mince',
      extraTenthPencePerKg: 250,
      cuts: {
        bavette: { flank: { meat: 9_500 } },
        'flank-steak': { flank: { meat: 13_000 } },
        trim: { flank: { meat: 74_500 } },
      },
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

const thickFlankChoice: Choice = {
  id: 'thick-flank',
  name: 'Thick flank',
  primalIds: ['thick-flank'],
  ways: [
    buildWay(['thick-flank'], {
      id: 'seamed',
      name: 'Tri-tip and thick flank steaks',
      extraTenthPencePerKg: 450,
      cuts: {
        'tri-tip': { 'thick-flank': { meat: 18_000 } },
        'thick-flank-steak': { 'thick-flank': { meat: 55_000 } },
        'lean-trim': { 'thick-flank': { meat: 26_000 } },
      },
      trimmedOff: { 'thick-flank': 1_000 },
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
  ],
};

const topsideChoice: Choice = {
  id: 'topside',
  name: 'Topside',
  primalIds: ['topside'],
  ways: [
    buildWay(['topside'], {
      id: 'bullet',
      name: 'Topside bullet and minute steaks',
      extraTenthPencePerKg: 350,
      cuts: {
        'topside-bullet': { topside: { meat: 58_000 } },
        'minute-steak': { topside: { meat: 26_000 } },
        'lean-trim': { topside: { meat: 15_000 } },
      },
      trimmedOff: { topside: 1_000 },
    }),
    buildWay(['topside'], {
      id: 'minute-steak',
      name: 'Minute steaks',
      extraTenthPencePerKg: 350,
      cuts: { 'minute-steak': { topside: { meat: 85_000 } }, 'lean-trim': { topside: { meat: 14_000 } } },
      trimmedOff: { topside: 1_000 },
    }),
  ],
};

/** Ribs and loin as on the traditional side, the rump in its muscles first. */
const loinRumpSeamed: Choice = {
  ...loinRumpChoice,
  ways: [...loinRumpChoice.ways].sort((a, b) => Number(b.id.endsWith('seamed')) - Number(a.id.endsWith('seamed'))),
};

const ribEyeFirst: Choice = {
  ...foreRibChoice,
  ways: [...foreRibChoice.ways].sort((a, b) => Number(b.id === 'rib-eye') - Number(a.id === 'rib-eye')),
};

export const seamChoices: readonly Choice[] = [
  foreShinChoice,
  neckChoice,
  chuckEyeChoice,
  bladeChoice,
  shoulderChoice,
  brisketChoice,
  ribEyeFirst,
  flankChoice,
  loinRumpSeamed,
  thickFlankChoice,
  topsideChoice,
  silversideChoice,
  hindShinChoice,
];
