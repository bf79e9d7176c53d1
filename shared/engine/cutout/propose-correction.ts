import { apportion } from '#shared/engine/apportion.ts';
import { toQuarter } from '#shared/engine/figures/reference-tissues.ts';
import type {
  Choice,
  Primal,
  Quarter,
  Specification,
  Tissue,
  Tissues,
  Way,
} from '#shared/engine/figures/specification.ts';
import { TISSUES } from '#shared/engine/figures/tissues.ts';
import { compareSides, type LinePair, type SideCut } from './weighed-sides.ts';

/** Below this many sides a proposal says that it rests on little. */
export const FEW_SIDES = 3;
/** What the specification says counts as much as this many sides of the farm's own: common practice. */
export const PRIOR_SIDES = 6;
const WHOLE = 100_000;

export type CorrectionRow = {
  /** `brisket` for a primal, `brisket/rolled/brisket-joint` for a line of a way. */
  path: string;
  name: string;
  sides: number;
  /** What the specification counts for, in sides: six, and those that it has learned from already. */
  priorSides: number;
  /** Foreseen, and weighed on the same sides brought to the weight that was foreseen for them. */
  estimatedGrams: number;
  weighedGrams: number;
  /** Weighed over foreseen, parts per 100,000: as seen, and as proposed after shrinking towards what was foreseen. */
  seenPpht: number;
  proposedPpht: number;
  isFromFewSides: boolean;
};

export type Correction = {
  sides: number;
  /** Set when fewer than three sides were weighed. */
  caution: string | null;
  rows: CorrectionRow[];
  /** The specification with the proposed percentages; it adds up, and the present one is untouched. */
  specification: Specification;
};

/** Sides that the percentages of a path were corrected by before: they are part of what is now foreseen. */
export type LearnedSides = ReadonlyMap<string, number>;

/**
 * What was seen, drawn towards what was foreseen (1): seen counts n / (n + k), where n is the number of sides weighed and
 * k what the specification counts for, in sides. One odd side moves little, many sides move nearly all the way. It is the
 * credibility estimator of insurance (H. Bühlmann, Experience rating and credibility, ASTIN Bulletin 4, 1967; reference
 * from memory); k = 6 is common practice.
 */
function shrink(seen: number, sides: number, priorSides: number): number {
  return 1 + ((seen - 1) * sides) / (sides + priorSides);
}

/** Ratio by `<primal>/<way>/<line>` and by `<primal>`; 1 where nothing was weighed. */
type Ratios = ReadonlyMap<string, { ratio: number; sides: number }>;

function toRow(pair: LinePair, learned: LearnedSides): CorrectionRow {
  const seen = pair.estimatedGrams > 0 ? pair.weighedGrams / pair.estimatedGrams : 1;
  const priorSides = PRIOR_SIDES + (learned.get(pair.path) ?? 0);
  return {
    path: pair.path,
    name: pair.name,
    sides: pair.sides,
    priorSides,
    estimatedGrams: pair.estimatedGrams,
    weighedGrams: Math.round(pair.weighedGrams),
    seenPpht: Math.round(seen * WHOLE),
    proposedPpht: Math.round(shrink(seen, pair.sides, priorSides) * WHOLE),
    isFromFewSides: pair.sides < FEW_SIDES,
  };
}

/**
 * What the farm's own scales say of a specification: by primal and line, foreseen against weighed, and the percentages
 * that would have foreseen it better, shrunk towards the present ones. Only what was weighed moves; a line's surplus goes
 * to the tissue that it is made of, and the whole is brought back to 100 %. The owner accepts or rejects it. The order of
 * the sides never matters. `history` must hold sides that the present percentages have not learned from: those that they
 * have are told as `learned`, and make it slower to move.
 */
export function proposeCorrection(
  specification: Specification,
  history: readonly SideCut[],
  learned: LearnedSides = new Map(),
): Correction {
  const rows = compareSides(specification, history).map((pair) => toRow(pair, learned));
  const ratios: Ratios = new Map(rows.map((row) => [row.path, { ratio: row.proposedPpht / WHOLE, sides: row.sides }]));
  const sides = Math.max(0, ...rows.map((row) => row.sides));
  const few = sides === 1 ? 'one side was' : `${sides} sides were`;
  return {
    sides,
    caution: sides < FEW_SIDES ? `Only ${few} weighed: fewer than three say little about the next one.` : null,
    rows,
    specification: applyRatios(specification, ratios),
  };
}

function applyRatios(specification: Specification, ratios: Ratios): Specification {
  const choiceOf = (id: string) => specification.choices.find(({ primalIds }) => primalIds.includes(id));
  const weights = specification.quarters.flatMap((quarter) =>
    quarter.primals.flatMap((primal) => {
      const factors = tissueFactors(primal, choiceOf(primal.id), ratios);
      return TISSUES.map((tissue) => ({
        id: `${primal.id}/${tissue}`,
        weight: Math.round(primal.tissues[tissue] * factors[tissue] * 1_000_000),
      }));
    }),
  );
  const parts = apportion(WHOLE, weights);
  const part = (primal: Primal, tissue: Tissue) => parts.get(`${primal.id}/${tissue}`) ?? 0;
  const correct = (quarter: Quarter) =>
    toQuarter(
      quarter.id,
      quarter.primals.map((primal) => ({
        ...primal,
        tissues: {
          meat: part(primal, 'meat'),
          fat: part(primal, 'fat'),
          bone: part(primal, 'bone'),
          loss: part(primal, 'loss'),
        },
      })),
    );
  const [fore, hind] = specification.quarters;
  return {
    ...specification,
    quarters: [correct(fore), correct(hind)],
    choices: specification.choices.map((choice) => ({
      ...choice,
      ways: choice.ways.map((way) => correctWay(way, choice.primalIds, ratios)),
    })),
  };
}

/** Each tissue by the lines that it goes to; where only the primal was weighed, all of it alike. */
function tissueFactors(primal: Primal, choice: Choice | undefined, ratios: Ratios): Tissues {
  const factors = { meat: 1, fat: 1, bone: 1, loss: 1 };
  const ways = (choice?.ways ?? []).map((way) => ({ way, sides: sidesOfWay(primal.id, way, ratios) }));
  const sides = ways.reduce((sum, one) => sum + one.sides, 0);
  const ofPrimal = ratios.get(primal.id)?.ratio ?? 1;
  for (const tissue of TISSUES) {
    if (sides === 0) factors[tissue] = tissue === 'loss' ? 1 : ofPrimal;
    else
      factors[tissue] =
        ways.reduce((sum, { way, sides: n }) => sum + n * wayFactor(primal.id, way, { tissue, ratios }), 0) / sides;
  }
  return factors;
}

function sidesOfWay(primalId: string, way: Way, ratios: Ratios): number {
  return Math.max(0, ...way.lines.map((line) => ratios.get(`${primalId}/${way.id}/${line.id}`)?.sides ?? 0));
}

function wayFactor(primalId: string, way: Way, about: { tissue: Tissue; ratios: Ratios }): number {
  return way.lines.reduce((sum, line) => {
    const take = line.takes.find((one) => one.primalId === primalId)?.[about.tissue] ?? 0;
    return sum + (take / WHOLE) * (about.ratios.get(`${primalId}/${way.id}/${line.id}`)?.ratio ?? 1);
  }, 0);
}

function correctWay(way: Way, primalIds: readonly string[], ratios: Ratios): Way {
  if (primalIds.every((id) => sidesOfWay(id, way, ratios) === 0)) return way;
  const shares = new Map<string, Map<string, number>>();
  for (const primalId of primalIds) {
    for (const tissue of TISSUES) {
      const weights = way.lines.map((line) => ({
        id: line.id,
        weight: Math.round(
          (line.takes.find((one) => one.primalId === primalId)?.[tissue] ?? 0) *
            (ratios.get(`${primalId}/${way.id}/${line.id}`)?.ratio ?? 1) *
            1_000_000,
        ),
      }));
      if (weights.some(({ weight }) => weight > 0)) shares.set(`${primalId}/${tissue}`, apportion(WHOLE, weights));
    }
  }
  return {
    ...way,
    lines: way.lines.map((line) => ({
      ...line,
      takes: line.takes.map((take) => {
        const share = (tissue: Tissue) => shares.get(`${take.primalId}/${tissue}`)?.get(line.id) ?? take[tissue];
        return { ...take, meat: share('meat'), fat: share('fat'), bone: share('bone'), loss: share('loss') };
      }),
    })),
  };
}
