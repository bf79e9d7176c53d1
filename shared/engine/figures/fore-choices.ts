import type { Choice } from './specification.ts';
import { buildWay } from './way-builder.ts';

/**
 * How the primals of a forequarter may be cut. Shares are common practice: joints and dice keep 92 to 97 % of the
 * boneless meat, the rest is trim; a way on the bone moves bone and fat into the product and leaves the total alone.
 */

const shin = (primal: 'fore-shin' | 'hind-shin'): Choice => ({
  id: primal,
  name: primal === 'fore-shin' ? 'Fore shin' : 'Hind shin',
  primalIds: [primal],
  ways: [
    buildWay([primal], {
      id: 'boneless',
      name: 'Boneless slices',
      cuts: { 'shin-slices': { [primal]: { meat: 95_000 } }, 'lean-trim': { [primal]: { meat: 5_000 } } },
    }),
    buildWay([primal], {
      id: 'on-the-bone',
      name: 'Slices on the bone',
      extraTenthPencePerKg: 150,
      cuts: { 'shin-on-the-bone': { [primal]: { meat: 100_000, bone: 88_000 } } },
    }),
    buildWay([primal], {
      id: 'trim',
      name: 'All for mince',
      cuts: { 'lean-trim': { [primal]: { meat: 98_500 } } },
      trimmedOff: { [primal]: 1_500 },
    }),
  ],
});

export const foreShinChoice = shin('fore-shin');
export const hindShinChoice = shin('hind-shin');

export const chuckChoice: Choice = {
  id: 'chuck',
  name: 'Neck and chuck',
  primalIds: ['chuck'],
  ways: [
    buildWay(['chuck'], {
      id: 'braising',
      name: 'Braising steak and dice',
      extraTenthPencePerKg: 200,
      cuts: {
        'braising-steak': { chuck: { meat: 33_000 } },
        'diced-beef': { chuck: { meat: 30_000 } },
        trim: { chuck: { meat: 36_000 } },
      },
      trimmedOff: { chuck: 1_000 },
    }),
    buildWay(['chuck'], {
      id: 'denver',
      name: 'Denver steaks, braising steak and dice',
      extraTenthPencePerKg: 350,
      cuts: {
        'denver-steak': { chuck: { meat: 4_000 } },
        'braising-steak': { chuck: { meat: 28_000 } },
        'diced-beef': { chuck: { meat: 30_000 } },
        trim: { chuck: { meat: 37_000 } },
      },
      trimmedOff: { chuck: 1_000 },
    }),
    buildWay(['chuck'], {
      id: 'trim',
      name: 'All for mince',
      cuts: { trim: { chuck: { meat: 98_000 } } },
      trimmedOff: { chuck: 2_000 },
    }),
  ],
};

export const bladeChoice: Choice = {
  id: 'blade',
  name: 'Blade',
  primalIds: ['blade'],
  ways: [
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
    buildWay(['blade'], {
      id: 'flat-iron',
      name: 'Flat iron steaks and dice',
      extraTenthPencePerKg: 450,
      cuts: {
        'flat-iron-steak': { blade: { meat: 34_000 } },
        'diced-beef': { blade: { meat: 42_000 } },
        trim: { blade: { meat: 21_000 } },
      },
      trimmedOff: { blade: 3_000 },
    }),
    buildWay(['blade'], {
      id: 'joint',
      name: 'Blade joints',
      cuts: { 'blade-joint': { blade: { meat: 90_000 } }, trim: { blade: { meat: 9_000 } } },
      trimmedOff: { blade: 1_000 },
    }),
  ],
};

export const legOfMuttonChoice: Choice = {
  id: 'leg-of-mutton',
  name: 'Leg of mutton cut',
  primalIds: ['leg-of-mutton'],
  ways: [
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
    buildWay(['leg-of-mutton'], {
      id: 'diced',
      name: 'Dice',
      extraTenthPencePerKg: 200,
      cuts: {
        'diced-beef': { 'leg-of-mutton': { meat: 62_000 } },
        trim: { 'leg-of-mutton': { meat: 38_000 } },
      },
    }),
    buildWay(['leg-of-mutton'], {
      id: 'trim',
      name: 'All for mince',
      cuts: { trim: { 'leg-of-mutton': { meat: 98_500 } } },
      trimmedOff: { 'leg-of-mutton': 1_500 },
    }),
  ],
};

export const brisketChoice: Choice = {
  id: 'brisket',
  name: 'Brisket',
  primalIds: ['brisket'],
  ways: [
    buildWay(['brisket'], {
      id: 'rolled',
      name: 'Boned and rolled',
      extraTenthPencePerKg: 150,
      cuts: { 'brisket-joint': { brisket: { meat: 90_000 } }, trim: { brisket: { meat: 10_000 } } },
    }),
    buildWay(['brisket'], {
      id: 'on-the-bone',
      name: 'On the bone',
      cuts: {
        'brisket-on-the-bone': { brisket: { meat: 96_000, bone: 90_000, fat: 15_000 } },
        trim: { brisket: { meat: 4_000 } },
      },
    }),
    buildWay(['brisket'], {
      id: 'trim',
      name: 'All for mince',
      cuts: { trim: { brisket: { meat: 98_000 } } },
      trimmedOff: { brisket: 2_000 },
    }),
  ],
};

export const foreRibChoice: Choice = {
  id: 'fore-rib',
  name: 'Fore rib',
  primalIds: ['fore-rib'],
  ways: [
    buildWay(['fore-rib'], {
      id: 'on-the-bone',
      name: 'On the bone',
      keepsVertebrae: true,
      cuts: {
        'fore-rib': { 'fore-rib': { meat: 97_000, bone: 90_000, fat: 50_000 } },
        trim: { 'fore-rib': { meat: 3_000 } },
      },
    }),
    buildWay(['fore-rib'], {
      id: 'rib-eye',
      name: 'Rib-eye steaks',
      extraTenthPencePerKg: 400,
      cuts: { 'rib-eye-steak': { 'fore-rib': { meat: 93_000 } }, trim: { 'fore-rib': { meat: 5_000 } } },
      trimmedOff: { 'fore-rib': 2_000 },
    }),
    buildWay(['fore-rib'], {
      id: 'rolled',
      name: 'Boned and rolled',
      extraTenthPencePerKg: 200,
      cuts: {
        'rib-rolled': { 'fore-rib': { meat: 96_000, fat: 15_000 } },
        trim: { 'fore-rib': { meat: 4_000 } },
      },
    }),
    buildWay(['fore-rib'], {
      id: 'chined',
      name: 'On the ribs, backbone off',
      extraTenthPencePerKg: 150,
      cuts: {
        'fore-rib-chined': { 'fore-rib': { meat: 97_000, bone: 55_000, fat: 45_000 } },
        trim: { 'fore-rib': { meat: 3_000 } },
      },
    }),
    buildWay(['fore-rib'], {
      id: 'cote-de-boeuf',
      name: 'Côte de boeuf',
      extraTenthPencePerKg: 300,
      cuts: {
        'cote-de-boeuf': { 'fore-rib': { meat: 92_000, bone: 50_000, fat: 35_000 } },
        trim: { 'fore-rib': { meat: 8_000 } },
      },
    }),
  ],
};

export const foreChoices: readonly Choice[] = [
  foreShinChoice,
  chuckChoice,
  bladeChoice,
  legOfMuttonChoice,
  brisketChoice,
  foreRibChoice,
];
