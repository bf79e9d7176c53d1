import { Button } from '#components/ui/button.tsx';
import { Table } from '#components/ui/table.tsx';
import type { PlannedChoice, PlannedSide } from '#shared/contracts/allocation.ts';
import { formatMoney } from '#shared/domain/words.ts';
import { nameSide } from './plan-words.ts';

type WaysTableProps = { side: PlannedSide; onChoose: (primalId: string) => void };

/** The same either/or choices as a table, for those who read rather than look. */
export function WaysTable({ side, onChoose }: WaysTableProps) {
  return (
    <Table
      caption={`How ${nameSide(side)}, is cut`}
      rows={side.choices}
      rowKey={(choice) => choice.choiceId}
      columns={[
        { id: 'name', title: 'Primal', cell: (choice) => choice.name },
        { id: 'way', title: 'Cut as', cell: wayWords },
        { id: 'lock', title: 'Lock', cell: lockWords },
        {
          id: 'change',
          title: 'Change',
          cell: (choice) =>
            choice.ways.length > 1 && choice.primalIds[0] ? (
              <Button
                kind="quiet"
                small
                label="Choose"
                name={`Choose the way of ${choice.name}, ${nameSide(side)}`}
                onPress={() => onChoose(choice.primalIds[0] ?? '')}
              />
            ) : (
              'one way only'
            ),
        },
      ]}
    />
  );
}

/** `rib-eye`, or `sold whole to` whom. */
export function wayWords(choice: PlannedChoice): string {
  if (choice.wayId === null) return choice.soldTo ? `sold whole to ${choice.soldTo}` : 'sold whole';
  return choice.ways.find((way) => way.wayId === choice.wayId)?.name ?? choice.wayId;
}

function lockWords(choice: PlannedChoice): string {
  if (!choice.isLocked) return 'none';
  return choice.lockCostPence ? `costs ${formatMoney(choice.lockCostPence)}` : 'costs nothing';
}
