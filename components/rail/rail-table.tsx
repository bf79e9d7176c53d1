import { formatWeight } from '#shared/domain/words.ts';
import type { RailGeometry } from './rail-geometry.ts';
import { railWords, type RailMode } from './rail-words.ts';

type RailTableProps = { geometry: RailGeometry; mode: RailMode; caption: string };

/** The same figures for those who listen: a real table, out of sight. */
export function RailTable({ geometry, mode, caption }: RailTableProps) {
  const words = railWords[mode];
  const rows = [
    ...geometry.columns.map((column) => ({
      ...column,
      id: column.primal.id,
      name: column.primal.name,
      grams: column.primal.grams,
    })),
    { ...geometry, id: 'all', name: 'All', grams: geometry.totalGrams },
  ];
  return (
    <div className="w-hidden">
      <table>
        <caption>{caption}</caption>
        <thead>
          <tr>
            {['primal', 'weight', words.sold, words.held, words.rest].map((word) => (
              <th key={word} scope="col">
                {word}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.id}>
              <th scope="row">{row.name}</th>
              <td>{formatWeight(row.grams)}</td>
              <td>{formatWeight(row.soldGrams)}</td>
              <td>{formatWeight(row.heldGrams)}</td>
              <td>{formatWeight(row.freeGrams)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
