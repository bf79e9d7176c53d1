import { Badge } from '#components/ui/badge.tsx';
import { Table } from '#components/ui/table.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import type { SpecificationEdition } from '#shared/contracts/specifications.ts';
import { formatCount, formatDay, formatDayWithYear, londonDayAndTime } from '#shared/domain/words.ts';
import { newestEditions } from '#shared/domain/specification-editions.ts';
import { originWords } from './specification-words.ts';

/** The farm's specifications by name, each with its newest edition and how many cutting days hold any of them. */
export function SpecificationTable({ editions }: { editions: readonly SpecificationEdition[] }) {
  const daysOf = (name: string) => editions.filter((one) => one.name === name).flatMap(({ days }) => days);
  return (
    <Table
      caption="Cutting specifications"
      rows={newestEditions(editions)}
      rowKey={({ name }) => name}
      empty="There is none yet: copy one that comes with the program."
      columns={[
        {
          id: 'name',
          title: 'Specification',
          cell: ({ id, name }) => <TextLink href={`/office/specifications/${id}`}>{name}</TextLink>,
        },
        { id: 'edition', title: 'Newest edition', cell: (row) => `${row.edition}, ${originWords(row)}` },
        { id: 'since', title: 'Since', cell: ({ createdAt }) => formatDayWithYear(londonDayAndTime(createdAt).day) },
        { id: 'days', title: 'Cutting days', cell: ({ name }) => formatCount(daysOf(name).length, 'day') },
        {
          id: 'state',
          title: 'For new days',
          cell: ({ isRetired }) => (
            <Badge kind={isRetired ? 'quiet' : 'free'}>{isRetired ? 'retired' : 'offered'}</Badge>
          ),
        },
      ]}
    />
  );
}

/** Every edition of one name, and the cutting days that keep it. */
export function EditionTable({ editions, openId }: { editions: readonly SpecificationEdition[]; openId: string }) {
  return (
    <Table
      caption="Editions of this specification"
      rows={editions}
      rowKey={({ id }) => id}
      columns={[
        {
          id: 'edition',
          title: 'Edition',
          cell: ({ id, edition }) =>
            id === openId ? (
              `${edition}, shown here`
            ) : (
              <TextLink href={`/office/specifications/${id}`} name={`${edition}: look at edition ${edition}`}>
                {String(edition)}
              </TextLink>
            ),
        },
        { id: 'origin', title: 'How it came about', cell: originWords },
        { id: 'since', title: 'Since', cell: ({ createdAt }) => formatDayWithYear(londonDayAndTime(createdAt).day) },
        {
          id: 'days',
          title: 'Cutting days that keep it',
          cell: ({ days }) =>
            days.length === 0 ? 'none' : days.map(({ day, state }) => `${formatDay(day)} (${state})`).join(', '),
        },
      ]}
    />
  );
}
