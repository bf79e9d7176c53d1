import { Disclosure } from '#components/ui/disclosure.tsx';
import { Table } from '#components/ui/table.tsx';
import { formatCount, formatDayTime, formatGrams, formatPercent } from '#shared/domain/words.ts';
import type { CorrectionProposal, CorrectionRow } from '#shared/contracts/specifications.ts';

/** How each proposal is reached: weighed over foreseen, and how much of that counts by the number of sides. */
export function WorkingTable({ rows }: { rows: readonly CorrectionRow[] }) {
  return (
    <Table
      caption="How the proposal is reached"
      rows={rows}
      rowKey={({ path }) => path}
      columns={[
        { id: 'name', title: 'Part', cell: nameOfRow },
        { id: 'foreseen', title: 'Foreseen', align: 'end', cell: ({ estimatedGrams }) => formatGrams(estimatedGrams) },
        { id: 'weighed', title: 'Weighed', align: 'end', cell: ({ weighedGrams }) => formatGrams(weighedGrams) },
        { id: 'seen', title: 'Weighed of foreseen', align: 'end', cell: ({ seenPpht }) => formatPercent(seenPpht) },
        {
          id: 'counts',
          title: 'Counts',
          align: 'end',
          cell: ({ sides, priorSides }) => `${sides} of ${sides + priorSides} sides`,
        },
        {
          id: 'proposed',
          title: 'Proposed of foreseen',
          align: 'end',
          cell: ({ proposedPpht }) => formatPercent(proposedPpht),
        },
      ]}
    />
  );
}

function nameOfRow({ path, name, isFromFewSides }: CorrectionRow): string {
  const [primal = '', way] = path.split('/');
  const where = way ? `${name}, from ${primal.replaceAll('-', ' ')} cut as ${way.replaceAll('-', ' ')}` : name;
  return isFromFewSides ? `${where} (fewer than three sides)` : where;
}

type Changes = Pick<CorrectionProposal, 'changes'>;

/** A twentieth of a per cent; most changes below it only bring the whole back to 100 %. */
const SMALL_PPHT = 50;

/** Every share that accepting would change, the small ones folded away. */
export function ChangeTables({ changes }: Changes) {
  const isSmall = ({ fromPpht, toPpht }: Changes['changes'][number]) =>
    Math.abs((toPpht ?? 0) - (fromPpht ?? 0)) < SMALL_PPHT;
  const small = changes.filter(isSmall);
  return (
    <>
      <ChangeTable caption="Shares that would change" changes={changes.filter((change) => !isSmall(change))} />
      {small.length > 0 ? (
        <Disclosure words={`${formatCount(small.length, 'change')} of less than ${formatPercent(SMALL_PPHT)}`}>
          <ChangeTable caption="Shares that would change a little" changes={small} />
        </Disclosure>
      ) : null}
    </>
  );
}

function ChangeTable({ caption, changes }: Changes & { caption: string }) {
  return (
    <Table
      caption={caption}
      rows={changes}
      rowKey={({ node }) => node}
      empty="No share would change by that much."
      columns={[
        { id: 'name', title: 'Share', cell: ({ name }) => name },
        { id: 'now', title: 'Now', align: 'end', cell: ({ fromPpht }) => shareWords(fromPpht) },
        { id: 'proposed', title: 'Proposed', align: 'end', cell: ({ toPpht }) => shareWords(toPpht) },
      ]}
    />
  );
}

const shareWords = (ppht: number | null) => (ppht === null ? 'none' : formatPercent(ppht));

/** What was decided before, by whom. */
export function DecisionTable({ decided }: Pick<CorrectionProposal, 'decided'>) {
  return (
    <Table
      caption="Decided before"
      rows={decided}
      rowKey={({ id }) => id}
      empty="Nothing was decided yet."
      columns={[
        { id: 'when', title: 'When', cell: ({ decidedAt }) => formatDayTime(decidedAt) },
        {
          id: 'what',
          title: 'What',
          cell: ({ decision, resultEdition }) =>
            resultEdition === null ? decision : `${decision}, as edition ${resultEdition}`,
        },
        { id: 'by', title: 'By', cell: ({ by }) => by },
        { id: 'sides', title: 'From', align: 'end', cell: ({ sides }) => formatCount(sides, 'side') },
      ]}
    />
  );
}
