import { Table } from '#components/ui/table.tsx';
import type { Allocation } from '#shared/contracts/allocation.ts';
import { formatMoney, formatWeight } from '#shared/domain/words.ts';
import { leftOverGrams, signedMoney } from './plan-words.ts';

type Row = { id: string; name: string; before: string; now: string; difference: string };

type CompareTableProps = {
  /** What the first column of figures stands for, as in `On sale`. */
  beforeTitle: string;
  nowTitle: string;
  before: Allocation | null;
  now: Allocation;
  /** Counts what goes on sale rather than what the plans make. */
  onSale?: boolean;
};

/** Two answers side by side, in boxes, packs and pounds. */
export function CompareTable({ beforeTitle, nowTitle, before, now, onSale = false }: CompareTableProps) {
  return (
    <Table<Row>
      caption={`${beforeTitle} against ${nowTitle.toLowerCase()}`}
      rows={compareRows(before, now, onSale)}
      rowKey={(row) => row.id}
      columns={[
        { id: 'name', title: 'What', cell: (row) => row.name },
        { id: 'before', title: beforeTitle, align: 'end', cell: (row) => row.before },
        { id: 'now', title: nowTitle, align: 'end', cell: (row) => row.now },
        { id: 'difference', title: 'Difference', align: 'end', cell: (row) => row.difference },
      ]}
    />
  );
}

/** Box kinds and loose cuts of either answer; one that only the other has counts as none. */
export function compareRows(before: Allocation | null, now: Allocation, onSale = false): Row[] {
  const countOf = (made: number, promised: number | null) => (onSale ? (promised ?? made) : made);
  const counts = (plan: Allocation | null) =>
    new Map([
      ...(plan?.boxes ?? []).map(
        (box) => [box.boxKindId, { name: box.name, count: countOf(box.count, box.promised) }] as const,
      ),
      ...(plan?.loose ?? []).map(
        (row) => [row.cutId, { name: `${row.name}, loose`, count: countOf(row.packs, row.promised) }] as const,
      ),
    ]);
  const was = counts(before);
  const is = counts(now);
  const rows = [...new Set([...is.keys(), ...was.keys()])].map((id) => {
    const more = (is.get(id)?.count ?? 0) - (was.get(id)?.count ?? 0);
    return {
      id,
      name: is.get(id)?.name ?? was.get(id)?.name ?? id,
      before: String(was.get(id)?.count ?? 0),
      now: String(is.get(id)?.count ?? 0),
      difference: more === 0 ? 'none' : `${more > 0 ? '+' : '−'} ${Math.abs(more)}`,
    };
  });
  const money = {
    id: 'contribution',
    name: 'Contribution',
    before: before ? formatMoney(before.contributionPence) : '–',
    now: formatMoney(now.contributionPence),
    difference: before ? signedMoney(now.contributionPence - before.contributionPence) : '–',
  };
  const left = {
    id: 'left',
    name: 'Left over',
    before: before ? formatWeight(leftOverGrams(before)) : '–',
    now: formatWeight(leftOverGrams(now)),
    difference: before ? formatWeight(leftOverGrams(now) - leftOverGrams(before)) : '–',
  };
  // Against nothing on sale, every row is news; against something, only what changes is.
  return [money, ...rows.filter((row) => row.difference !== 'none' || before === null), left];
}
