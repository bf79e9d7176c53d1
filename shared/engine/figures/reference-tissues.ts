import type { NarrowPrimal, Primal, Quarter, QuarterId, Tissues } from './specification.ts';

/**
 * Fourteen boneless primals of commercial boning halls, mean kg per animal over 31,827 cattle: Judge et al. 2019,
 * Journal of Animal Science 97:2769-2779, doi 10.1093/jas/skz152, table 1. Their sum is 237.09 kg.
 */
export const BONELESS_PRIMAL_KG = {
  topside: 23.56,
  silversideFlat: 16.64,
  salmonCut: 6.67,
  thickFlank: 14.46,
  rump: 19.28,
  striploin: 16.35,
  fillet: 7.23,
  cubeRoll: 12.52,
  bavette: 13.76,
  brisket: 16.56,
  chuckTender: 13.48,
  legOfMutton: 26.98,
  chuckAndNeck: 37.44,
  heelAndShank: 12.16,
} as const;

/**
 * Boneless trimmed meat of an R4L carcase, parts per 100,000 of cold weight: the trade's 70 %, of which an Australian
 * trade guide gives 60 as primals and 10 as trimmings. Bone and fat of the whole are 18.3 and 10.7 %, loss 1.0 %.
 */
export const REFERENCE_CLASS = { conformation: 'R', fatClass: '4L' } as const;

type Row = {
  id: string;
  name: string;
  shortName: string;
  quarter: QuarterId;
  hasVertebrae: boolean;
  /** Meat, fat, bone, loss; parts per 100,000 of the side. */
  tissues: readonly [meat: number, fat: number, bone: number, loss: number];
};

/**
 * One side of an R4L carcase, quartered between the tenth and the eleventh rib, in carcase order from the fore shin to
 * the hind shin. Meat is the table above scaled to 70,000 by largest remainder; fat, bone and loss by primal are common
 * practice, chosen so that the bone-in weights of the trade come out and the forequarter is 50.7 %. Common practice also
 * splits shin 43 : 57 between fore and hind and fillet 72 : 28 between loin (body) and rump (head).
 */
// prettier-ignore
const ROWS: readonly Row[] = [
  { id: 'fore-shin', name: 'Fore shin', shortName: 'Shin', quarter: 'fore', hasVertebrae: false, tissues: [1_550, 100, 1_450, 30] },
  { id: 'chuck', name: 'Neck and chuck', shortName: 'Chuck', quarter: 'fore', hasVertebrae: true, tissues: [11_054, 1_900, 3_300, 190] },
  { id: 'blade', name: 'Blade', shortName: 'Blade', quarter: 'fore', hasVertebrae: false, tissues: [3_980, 500, 1_350, 60] },
  { id: 'leg-of-mutton', name: 'Leg of mutton cut', shortName: 'LMC', quarter: 'fore', hasVertebrae: false, tissues: [7_966, 900, 1_450, 100] },
  { id: 'brisket', name: 'Brisket', shortName: 'Brisket', quarter: 'fore', hasVertebrae: false, tissues: [4_889, 1_800, 1_800, 80] },
  { id: 'fore-rib', name: 'Fore rib', shortName: 'Rib', quarter: 'fore', hasVertebrae: true, tissues: [3_697, 900, 1_550, 80] },
  { id: 'flank', name: 'Flank', shortName: 'Flank', quarter: 'hind', hasVertebrae: false, tissues: [4_063, 1_350, 250, 50] },
  { id: 'loin', name: 'Loin', shortName: 'Loin', quarter: 'hind', hasVertebrae: true, tissues: [6_364, 1_050, 2_050, 90] },
  { id: 'rump', name: 'Rump', shortName: 'Rump', quarter: 'hind', hasVertebrae: true, tissues: [6_290, 750, 1_350, 90] },
  { id: 'thick-flank', name: 'Thick flank', shortName: 'Thick fl.', quarter: 'hind', hasVertebrae: false, tissues: [4_269, 350, 350, 50] },
  { id: 'topside', name: 'Topside', shortName: 'Topside', quarter: 'hind', hasVertebrae: false, tissues: [6_956, 500, 900, 70] },
  { id: 'silverside', name: 'Silverside', shortName: 'Silver.', quarter: 'hind', hasVertebrae: false, tissues: [6_882, 500, 600, 70] },
  { id: 'hind-shin', name: 'Hind shin', shortName: 'Shin', quarter: 'hind', hasVertebrae: false, tissues: [2_040, 100, 1_900, 40] },
];

const QUARTER_NAMES = { fore: 'Forequarter', hind: 'Hindquarter' } as const satisfies Record<QuarterId, string>;

/** All tissues of one primal or of several together. */
export function sumTissues(all: readonly Tissues[]): Tissues {
  const sum = { meat: 0, fat: 0, bone: 0, loss: 0 };
  for (const one of all) {
    sum.meat += one.meat;
    sum.fat += one.fat;
    sum.bone += one.bone;
    sum.loss += one.loss;
  }
  return sum;
}

export function totalTissues({ meat, fat, bone, loss }: Tissues): number {
  return meat + fat + bone + loss;
}

/** A quarter of the primals given, its share of the side taken from them. */
export function toQuarter(id: QuarterId, primals: readonly Primal[]): Quarter {
  const sharePpht = primals.reduce((sum, primal) => sum + totalTissues(primal.tissues), 0);
  return { id, name: QUARTER_NAMES[id], sharePpht, primals: [...primals] };
}

function referencePrimals(quarter: QuarterId): Primal[] {
  return ROWS.filter((row) => row.quarter === quarter).map((row) => {
    const [meat, fat, bone, loss] = row.tissues;
    const { id, name, shortName, hasVertebrae } = row;
    return { id, name, shortName, hasVertebrae, tissues: { meat, fat, bone, loss } };
  });
}

/** The two quarters of the reference side. */
export const referenceQuarters: [Quarter, Quarter] = [
  toQuarter('fore', referencePrimals('fore')),
  toQuarter('hind', referencePrimals('hind')),
];

/** Nine segments for a narrow rail; only neighbours are merged. */
export const referenceNarrowPrimals: NarrowPrimal[] = [
  { id: 'chuck-and-shin', name: 'Fore shin, neck and chuck', shortName: 'Chuck', primalIds: ['fore-shin', 'chuck'] },
  { id: 'shoulder', name: 'Blade and leg of mutton cut', shortName: 'Blade', primalIds: ['blade', 'leg-of-mutton'] },
  { id: 'brisket', name: 'Brisket', shortName: 'Brisket', primalIds: ['brisket'] },
  { id: 'fore-rib', name: 'Fore rib', shortName: 'Rib', primalIds: ['fore-rib'] },
  { id: 'flank', name: 'Flank', shortName: 'Flank', primalIds: ['flank'] },
  { id: 'loin', name: 'Loin', shortName: 'Loin', primalIds: ['loin'] },
  { id: 'rump', name: 'Rump and thick flank', shortName: 'Rump', primalIds: ['rump', 'thick-flank'] },
  { id: 'round', name: 'Topside and silverside', shortName: 'Topside', primalIds: ['topside', 'silverside'] },
  { id: 'hind-shin', name: 'Hind shin', shortName: 'Shin', primalIds: ['hind-shin'] },
];
