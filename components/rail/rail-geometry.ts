/** One piece hanging from the rail. Sold and held are parts of `grams`; what remains is free. */
export type RailPrimal = {
  id: string;
  name: string;
  /** For places where the name does not fit. */
  shortName: string;
  grams: number;
  soldGrams: number;
  heldGrams: number;
  /** The primals that were merged into this one on a narrow rail. */
  memberIds?: readonly string[];
};

/** Several primals of the specification shown as one where the rail is narrow. */
export type RailGroup = { id: string; name: string; shortName: string; memberIds: readonly string[] };

export type RailColumn = {
  primal: RailPrimal;
  /** As drawn: sold, held and free sum to the primal's grams. */
  soldGrams: number;
  heldGrams: number;
  freeGrams: number;
  /** Share of the rail's length, by weight. */
  widthPercent: number;
  soldPercent: number;
  heldPercent: number;
  freePercent: number;
};

export type RailGeometry = {
  /** Length of the rail as a share of the scale: 100 when it has the scale for itself. */
  lengthPercent: number;
  totalGrams: number;
  soldGrams: number;
  heldGrams: number;
  freeGrams: number;
  columns: RailColumn[];
};

/** Letters of the labels take this many hundredths of their size on average, with digits and capitals. */
const LETTER_HUNDREDTHS = 54;

/**
 * Widths by weight and fills from the top, so that area is kilograms. Sold comes before held: a primal that is promised
 * beyond its weight shows as full, never as wider or taller than it is.
 */
export function layOutRail(primals: readonly RailPrimal[], scaleGrams?: number): RailGeometry {
  const hanging = primals.filter((primal) => primal.grams > 0);
  const totalGrams = sum(hanging.map((primal) => primal.grams));
  const columns = hanging.map((primal) => layOutColumn(primal, totalGrams));
  const scale = Math.max(scaleGrams ?? totalGrams, totalGrams);
  return {
    lengthPercent: scale > 0 ? (totalGrams / scale) * 100 : 0,
    totalGrams,
    soldGrams: sum(columns.map((column) => column.soldGrams)),
    heldGrams: sum(columns.map((column) => column.heldGrams)),
    freeGrams: sum(columns.map((column) => column.freeGrams)),
    columns,
  };
}

function layOutColumn(primal: RailPrimal, totalGrams: number): RailColumn {
  const soldGrams = clamp(primal.soldGrams, primal.grams);
  const heldGrams = clamp(primal.heldGrams, primal.grams - soldGrams);
  const freeGrams = primal.grams - soldGrams - heldGrams;
  const share = (grams: number) => (grams / primal.grams) * 100;
  return {
    primal,
    soldGrams,
    heldGrams,
    freeGrams,
    widthPercent: (primal.grams / totalGrams) * 100,
    soldPercent: share(soldGrams),
    heldPercent: share(heldGrams),
    freePercent: share(freeGrams),
  };
}

function clamp(grams: number, most: number): number {
  return Math.min(Math.max(grams, 0), most);
}

function sum(grams: number[]): number {
  return grams.reduce((total, next) => total + next, 0);
}

/** Merges primals for a narrow rail, in the order of the groups. A primal that no group names stays by itself, at the end. */
export function mergePrimals(primals: readonly RailPrimal[], groups: readonly RailGroup[]): RailPrimal[] {
  const grouped = new Set(groups.flatMap((group) => group.memberIds));
  const merged = groups.map((group) => {
    const members = primals.filter((primal) => group.memberIds.includes(primal.id));
    return {
      ...group,
      grams: sum(members.map((member) => member.grams)),
      soldGrams: sum(members.map((member) => member.soldGrams)),
      heldGrams: sum(members.map((member) => member.heldGrams)),
    };
  });
  return [...merged, ...primals.filter((primal) => !grouped.has(primal.id))];
}

/** The width that a label needs, in whole half-letters of its own size (`em`): the number in the `rail-fit-` classes. */
export function halfEmsOf(label: string): number {
  return Math.ceil((label.length * LETTER_HUNDREDTHS * 2) / 100);
}

/** Which primal a selection lands on: the same one, or the merged one that holds it. */
export function holds(primal: RailPrimal, id: string | undefined): boolean {
  return id !== undefined && (primal.id === id || (primal.memberIds?.includes(id) ?? false));
}
