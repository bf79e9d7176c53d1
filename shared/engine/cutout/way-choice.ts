import type { Choice, Specification, Way } from '#shared/engine/figures/specification.ts';
import { AppError } from '#shared/errors.ts';
import { SIDES, type ChosenWays, type ClosedWay, type SideName } from './cutout-types.ts';
import type { WayOfChoice } from './side-tree.ts';

type Question = {
  specification: Specification;
  measuredPaths: readonly string[];
  closedReason: string | null;
  chosen: Readonly<Record<SideName, ChosenWays>>;
};

/** What has been weighed of each primal of a side, by line: `left/fore/brisket/brisket-joint`. */
function weighedLines(paths: readonly string[], side: SideName, choice: Choice): Set<string> {
  const parts = paths.map((path) => path.split('/'));
  const lines = parts.filter(
    ([at, , primalId = '', line]) => at === side && line && choice.primalIds.includes(primalId),
  );
  return new Set(lines.map(([, , primalId, line]) => `${primalId}/${line}`));
}

function canGive(way: Way, weighed: ReadonlySet<string>): boolean {
  const given = new Set(way.lines.flatMap((line) => line.takes.map((take) => `${take.primalId}/${line.id}`)));
  return [...weighed].every((line) => given.has(line));
}

/**
 * The way of one choice. What lies weighed on the block decides before anything else; then the way chosen, unless it is
 * closed; then the first open one. Refuses with INVALID_INPUT when no way gives the lines that were weighed.
 */
function pickWay(side: SideName, choice: Choice, question: Question): Way {
  const weighed = weighedLines(question.measuredPaths, side, choice);
  const fitting = choice.ways.filter((way) => canGive(way, weighed));
  const open = fitting.filter((way) => !(way.keepsVertebrae && question.closedReason));
  const wanted = open.find((way) => way.id === question.chosen[side][choice.id]);
  const way = wanted ?? open[0] ?? fitting[0];
  if (way) return way;
  const lines = [...weighed].join(', ');
  const message = `No way of cutting ${choice.name} gives ${lines} together. Nothing was changed; check what was weighed.`;
  throw new AppError('INVALID_INPUT', message, { fields: { [`${side}/${choice.id}`]: message } });
}

export function pickWays(question: Question): Record<SideName, WayOfChoice> {
  const pick = (side: SideName) =>
    new Map(question.specification.choices.map((choice) => [choice.id, pickWay(side, choice, question)]));
  return { left: pick('left'), right: pick('right') };
}

/** Ways that keep vertebral column, on both sides, where the carcase is too old for them. */
export function listClosedWays(specification: Specification, closedReason: string | null): ClosedWay[] {
  if (closedReason === null) return [];
  return SIDES.flatMap((side) =>
    specification.choices.flatMap((choice) =>
      choice.ways
        .filter((way) => way.keepsVertebrae)
        .map((way) => ({ side, choiceId: choice.id, wayId: way.id, reason: closedReason })),
    ),
  );
}
