import { Table } from '#components/ui/table.tsx';
import { Text } from '#components/ui/text.tsx';

type BoxWaiting = { name: string; waiting: number; kept: number; taken: number };

/** How many wait for each box. */
export function WaitingTable({ boxes }: { boxes: readonly BoxWaiting[] }) {
  if (boxes.length === 0) return <Text tone="quiet">Nobody waits for a box.</Text>;
  return (
    <Table
      caption="Waiting list"
      rows={boxes}
      rowKey={(box) => box.name}
      columns={[
        { id: 'box', title: 'Box', cell: (box) => box.name },
        { id: 'waiting', title: 'Waiting', align: 'end', cell: (box) => box.waiting },
        { id: 'kept', title: 'Kept now', align: 'end', cell: (box) => box.kept },
        { id: 'taken', title: 'Took theirs', align: 'end', cell: (box) => box.taken },
      ]}
    />
  );
}
