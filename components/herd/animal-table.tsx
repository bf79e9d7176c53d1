import { Badge } from '#components/ui/badge.tsx';
import { Table } from '#components/ui/table.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import type { Animal } from '#shared/contracts/herd.ts';
import type { Day } from '#shared/domain/day.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatCount, formatDayWithYear, formatKilograms } from '#shared/domain/words.ts';
import { describeAnimal } from './animal-state.ts';

type AnimalTableProps = { animals: readonly Animal[]; today: Day | undefined };

export function AnimalTable({ animals, today }: AnimalTableProps) {
  return (
    <Table
      caption="The herd"
      rows={animals}
      rowKey={(animal) => animal.id}
      empty="No animal fits what you look for."
      columns={[
        {
          id: 'tag',
          title: 'Ear tag',
          cell: (animal) => (
            <TextLink href={`/office/herd/${animal.id}`} tone="ink">
              {formatEarTag(animal.earTag)}
            </TextLink>
          ),
        },
        { id: 'kind', title: 'Kind', cell: (animal) => `${animal.breed}, ${animal.sex}` },
        { id: 'born', title: 'Born', cell: (animal) => formatDayWithYear(animal.born) },
        { id: 'age', title: 'Age', align: 'end', cell: (animal) => formatCount(animal.ageMonths, 'month') },
        {
          id: 'live',
          title: 'Live weight',
          align: 'end',
          cell: (animal) => (animal.liveGrams === null ? 'not weighed' : formatKilograms(animal.liveGrams)),
        },
        {
          id: 'state',
          title: 'State',
          cell: (animal) => {
            const { kind, words } = describeAnimal(animal, today);
            return animal.carcase ? (
              <TextLink href={`/office/carcases/${animal.carcase.id}`} tone="ink">
                {words}
              </TextLink>
            ) : (
              <Badge kind={kind}>{words}</Badge>
            );
          },
        },
      ]}
    />
  );
}
