import { Button } from '#components/ui/button.tsx';
import { Table } from '#components/ui/table.tsx';
import type { PackingDay } from '#shared/contracts/packs.ts';
import { formatWeight } from '#shared/domain/words.ts';

type Line = PackingDay['cuttingList'][number];

type CuttingListProps = {
  title: string;
  lines: readonly Line[];
  onWeigh: (line: Line) => void;
};

/** What is to be cut from one carcase, and how much of it lies weighed. */
export function CuttingList({ title, lines, onWeigh }: CuttingListProps) {
  const sum = (key: 'foreseenGrams' | 'packedGrams') => lines.reduce((total, line) => total + line[key], 0);
  return (
    <Table
      caption={`Cutting list of ${title}`}
      rows={lines}
      rowKey={(line) => `${line.cutId} ${line.way}`}
      empty="Nothing is planned from this carcase yet."
      columns={[
        { id: 'cut', title: 'Cut', cell: (line) => line.cut, foot: 'Together' },
        { id: 'way', title: 'Cut as', cell: (line) => line.way, foot: '' },
        {
          id: 'foreseen',
          title: 'Foreseen',
          align: 'end',
          cell: (line) => formatWeight(line.foreseenGrams),
          foot: formatWeight(sum('foreseenGrams')),
        },
        {
          id: 'packed',
          title: 'Packed',
          align: 'end',
          cell: (line) => formatWeight(line.packedGrams),
          foot: formatWeight(sum('packedGrams')),
        },
        {
          id: 'weigh',
          title: 'Weigh',
          cell: (line) => (
            <Button
              kind="quiet"
              small
              label="Weigh"
              name={`Weigh ${line.cut}, ${title}`}
              onPress={() => onWeigh(line)}
            />
          ),
        },
      ]}
    />
  );
}
