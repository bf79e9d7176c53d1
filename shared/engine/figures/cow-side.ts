import { composition } from '#shared/engine/cutout/composition.ts';
import { rescale } from '#shared/engine/cutout/effective-specification.ts';
import { cutsOf } from './british-cuts.ts';
import { foreShinChoice, hindShinChoice } from './fore-choices.ts';
import { REFERENCE_CLASS, referenceNarrowPrimals, referenceQuarters } from './reference-tissues.ts';
import type { Choice, Specification } from './specification.ts';
import { buildWay, type WayRecipe } from './way-builder.ts';

/** A cow is usually -O 4L: that is where her specification stands, by the same slopes as every class adjustment. */
const COW_CLASS = { conformation: '-O', fatClass: '4L' } as const;

/** All for mince, and whatever else is worth taking off first. */
function minceLed([id, name]: readonly [string, string], others: readonly WayRecipe[], trim = 'trim'): Choice {
  const mince = buildWay([id], {
    id: 'trim',
    name: 'All for mince',
    cuts: { [trim]: { [id]: { meat: 97_500 } } },
    trimmedOff: { [id]: 2_500 },
  });
  return { id, name, primalIds: [id], ways: [mince, ...others.map((recipe) => buildWay([id], recipe))] };
}

const diced = (id: string, meat: number, trim = 'trim'): WayRecipe => ({
  id: 'diced',
  name: 'Dice, the rest for mince',
  extraTenthPencePerKg: 200,
  cuts: { 'diced-beef': { [id]: { meat } }, [trim]: { [id]: { meat: 98_000 - meat } } },
  trimmedOff: { [id]: 2_000 },
});

/**
 * Of loin and rump the fillet is always worth its steaks; sirloin and rump are steaks or go for lean mince. No way keeps
 * vertebral column, since cows are nearly always over thirty months.
 */
const loinRumpChoice: Choice = {
  id: 'loin-rump',
  name: 'Loin and rump',
  primalIds: ['loin', 'rump'],
  ways: [
    buildWay(['loin', 'rump'], {
      id: 'steaks',
      name: 'Sirloin, fillet and rump steaks',
      extraTenthPencePerKg: 275,
      cuts: {
        'sirloin-steak': { loin: { meat: 64_000 } },
        'fillet-steak': { loin: { meat: 19_000 }, rump: { meat: 7_400 } },
        'rump-steak': { rump: { meat: 76_000 } },
        'lean-trim': { loin: { meat: 13_000 }, rump: { meat: 12_600 } },
      },
      trimmedOff: { loin: 4_000, rump: 4_000 },
    }),
    buildWay(['loin', 'rump'], {
      id: 'fillet',
      name: 'Fillet steaks, the rest for lean mince',
      extraTenthPencePerKg: 100,
      cuts: {
        'fillet-steak': { loin: { meat: 19_000 }, rump: { meat: 7_400 } },
        'lean-trim': { loin: { meat: 78_000 }, rump: { meat: 89_600 } },
      },
      trimmedOff: { loin: 3_000, rump: 3_000 },
    }),
  ],
};

const ribEye: WayRecipe = {
  id: 'rib-eye',
  name: 'Rib-eye steaks',
  extraTenthPencePerKg: 400,
  cuts: { 'rib-eye-steak': { 'fore-rib': { meat: 88_000 } }, trim: { 'fore-rib': { meat: 9_000 } } },
  trimmedOff: { 'fore-rib': 3_000 },
};

const rolled: WayRecipe = {
  id: 'rolled',
  name: 'Boned and rolled',
  extraTenthPencePerKg: 150,
  cuts: { 'brisket-joint': { brisket: { meat: 86_000 } }, trim: { brisket: { meat: 14_000 } } },
};

const joint = (id: string, cutId: string, name: string): WayRecipe => ({
  id: 'joint',
  name,
  cuts: { [cutId]: { [id]: { meat: 90_000 } }, 'lean-trim': { [id]: { meat: 10_000 } } },
});

const minceFirst = (choice: Choice): Choice => ({
  ...choice,
  ways: [...choice.ways].sort((a, b) => Number(b.id === 'trim') - Number(a.id === 'trim')),
});

const ribChoice = minceLed(['fore-rib', 'Fore rib'], [ribEye]);

const choices: Choice[] = [
  minceFirst(foreShinChoice),
  minceLed(['chuck', 'Neck and chuck'], [diced('chuck', 55_000)]),
  minceLed(['blade', 'Blade'], [diced('blade', 75_000)]),
  minceLed(['leg-of-mutton', 'Leg of mutton cut'], [diced('leg-of-mutton', 60_000)]),
  minceLed(['brisket', 'Brisket'], [rolled]),
  { ...ribChoice, ways: [...ribChoice.ways].reverse() },
  minceLed(['flank', 'Flank'], []),
  loinRumpChoice,
  minceLed(['thick-flank', 'Thick flank'], [diced('thick-flank', 85_000, 'lean-trim')], 'lean-trim'),
  minceLed(['topside', 'Topside'], [joint('topside', 'topside-joint', 'Topside joints')], 'lean-trim'),
  minceLed(['silverside', 'Silverside'], [joint('silverside', 'silverside-joint', 'Silverside joints')], 'lean-trim'),
  minceFirst(hindShinChoice),
];

/** A cow for the mincer: steaks where they pay, joints and dice only where they are wanted. */
export const cowSide: Specification = {
  id: 'cow-side',
  name: 'Cow side, mince-led',
  source:
    'The R4L side of Judge et al. 2019 (J Anim Sci 97:2769-2779, table 1) brought to -O 4L by the published class slopes. Ways, bone, fat and loss: common practice.',
  reference: { ...COW_CLASS },
  quarters: rescale(
    referenceQuarters,
    composition(REFERENCE_CLASS.conformation, REFERENCE_CLASS.fatClass).tissues,
    composition(COW_CLASS.conformation, COW_CLASS.fatClass).tissues,
  ),
  narrowPrimals: referenceNarrowPrimals,
  choices,
  cuts: cutsOf(choices),
};
