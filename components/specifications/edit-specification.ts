import type { Choice, QuarterId, Specification, Tissue, Way, WayLine } from '#shared/engine/figures/specification.ts';

/** Edits of a draft: each gives a new specification and leaves the old one alone. None makes it add up by itself. */

type WayPlace = { choiceId: string; wayId: string };
export type TakePlace = WayPlace & { lineId: string; primalId: string; tissue: Tissue };

export function setTissue(
  draft: Specification,
  { primalId, tissue }: { primalId: string; tissue: Tissue },
  ppht: number,
): Specification {
  const [fore, hind] = draft.quarters;
  const edit = (quarter: typeof fore) => ({
    ...quarter,
    primals: quarter.primals.map((primal) =>
      primal.id === primalId ? { ...primal, tissues: { ...primal.tissues, [tissue]: ppht } } : primal,
    ),
  });
  return { ...draft, quarters: [edit(fore), edit(hind)] };
}

export function setQuarterShare(draft: Specification, quarterId: QuarterId, sharePpht: number): Specification {
  const [fore, hind] = draft.quarters;
  const edit = (quarter: typeof fore) => (quarter.id === quarterId ? { ...quarter, sharePpht } : quarter);
  return { ...draft, quarters: [edit(fore), edit(hind)] };
}

function editChoice(draft: Specification, choiceId: string, edit: (choice: Choice) => Choice): Specification {
  return { ...draft, choices: draft.choices.map((choice) => (choice.id === choiceId ? edit(choice) : choice)) };
}

export function editWay(
  draft: Specification,
  { choiceId, wayId }: WayPlace,
  changes: Partial<Pick<Way, 'name' | 'keepsVertebrae' | 'extraTenthPencePerKg' | 'lines'>>,
): Specification {
  return editChoice(draft, choiceId, (choice) => ({
    ...choice,
    ways: choice.ways.map((way) => (way.id === wayId ? { ...way, ...changes } : way)),
  }));
}

export function findWay(draft: Specification, { choiceId, wayId }: WayPlace): Way | undefined {
  return draft.choices.find(({ id }) => id === choiceId)?.ways.find(({ id }) => id === wayId);
}

export function setTake(draft: Specification, place: TakePlace, ppht: number): Specification {
  const lines = (findWay(draft, place)?.lines ?? []).map((line) =>
    line.id === place.lineId ? setTakeOfLine(line, place, ppht) : line,
  );
  return editWay(draft, place, { lines });
}

function setTakeOfLine(line: WayLine, { primalId, tissue }: TakePlace, ppht: number): WayLine {
  const nothing = { primalId, meat: 0, fat: 0, bone: 0, loss: 0 };
  const takes = line.takes.some((take) => take.primalId === primalId) ? line.takes : [...line.takes, nothing];
  return { ...line, takes: takes.map((take) => (take.primalId === primalId ? { ...take, [tissue]: ppht } : take)) };
}

/** A cut or trim that the way does not give yet, taking nothing so far; it stands after the other products. */
export function addLine(draft: Specification, place: WayPlace, cutId: string): Specification {
  const choice = draft.choices.find(({ id }) => id === place.choiceId);
  const kind = draft.cuts.find(({ id }) => id === cutId)?.kind;
  const way = findWay(draft, place);
  if (!choice || !way || (kind !== 'cut' && kind !== 'trim')) return draft;
  const takes = choice.primalIds.map((primalId) => ({ primalId, meat: 0, fat: 0, bone: 0, loss: 0 }));
  const isProduct = (line: WayLine) => line.kind === 'cut' || line.kind === 'trim';
  const lines = [
    ...way.lines.filter(isProduct),
    { id: cutId, kind, takes },
    ...way.lines.filter((line) => !isProduct(line)),
  ];
  return editWay(draft, place, { lines });
}

export function removeLine(draft: Specification, place: WayPlace, lineId: string): Specification {
  const lines = (findWay(draft, place)?.lines ?? []).filter(({ id }) => id !== lineId);
  return editWay(draft, place, { lines });
}

/** Cuts and trim of the specification that this way does not give. */
export function cutsToAdd(draft: Specification, way: Way): { id: string; name: string }[] {
  const given = new Set(way.lines.map(({ id }) => id));
  return draft.cuts.filter(({ id, kind }) => kind !== 'mince' && !given.has(id)).map(({ id, name }) => ({ id, name }));
}

/** A second way that starts as the first one is, with an id that the choice does not have yet. */
export function copyWay(
  draft: Specification,
  { choiceId, wayId }: WayPlace,
): { draft: Specification; wayId: string } | null {
  const choice = draft.choices.find(({ id }) => id === choiceId);
  const way = choice?.ways.find(({ id }) => id === wayId);
  if (!choice || !way) return null;
  const stem = wayId.replace(/-\d+$/, '').slice(0, 34);
  let number = 2;
  while (choice.ways.some(({ id }) => id === `${stem}-${number}`)) number += 1;
  const copy = { ...structuredClone(way), id: `${stem}-${number}`, name: `${way.name.slice(0, 72)}, copy` };
  const ways = choice.ways.flatMap((one) => (one.id === wayId ? [one, copy] : [one]));
  return { draft: editChoice(draft, choiceId, (one) => ({ ...one, ways })), wayId: copy.id };
}

export function removeWay(draft: Specification, { choiceId, wayId }: WayPlace): Specification {
  return editChoice(draft, choiceId, (choice) => ({ ...choice, ways: choice.ways.filter(({ id }) => id !== wayId) }));
}
