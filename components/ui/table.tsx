import type { ReactNode } from 'react';

export type Column<Row> = {
  id: string;
  title: string;
  cell: (row: Row) => ReactNode;
  align?: 'start' | 'end';
  /** A sum under the column. */
  foot?: ReactNode;
};

type TableProps<Row> = {
  /** Says what the table holds; out of sight unless `captionShown`. */
  caption: string;
  captionShown?: boolean;
  /** The first column names the row. */
  columns: readonly Column<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  empty?: string;
};

/** A real table, which stacks row by row where its place is under 560 px wide. */
export function Table<Row>({ caption, captionShown = false, columns, rows, rowKey, empty }: TableProps<Row>) {
  const hasFoot = columns.some((column) => column.foot !== undefined);
  return (
    <div className="w-table-frame">
      <table className="w-table">
        <caption className={captionShown ? 't-caps' : 'w-hidden'}>{caption}</caption>
        <thead>
          <tr>
            {columns.map((column) => (
              <th key={column.id} scope="col" className={alignOf(column)}>
                {column.title}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={rowKey(row)}>
              {columns.map((column, at) => (
                <Cell key={column.id} column={column} isHead={at === 0}>
                  {column.cell(row)}
                </Cell>
              ))}
            </tr>
          ))}
          {rows.length === 0 ? (
            <tr>
              <td colSpan={columns.length} className="w-table-empty">
                {empty ?? 'Nothing here yet.'}
              </td>
            </tr>
          ) : null}
        </tbody>
        {hasFoot ? <Foot columns={columns} /> : null}
      </table>
    </div>
  );
}

function alignOf<Row>(column: Column<Row>): string | undefined {
  return column.align === 'end' ? 'w-cell-end' : undefined;
}

type CellProps<Row> = { column: Column<Row>; isHead: boolean; children: ReactNode };

function Cell<Row>({ column, isHead, children }: CellProps<Row>) {
  if (isHead) {
    return (
      <th scope="row" className={alignOf(column)}>
        {children}
      </th>
    );
  }
  // When rows stack, the column's title stands before each value; the stylesheet takes it from `data-title`.
  return (
    <td className={alignOf(column)} data-title={column.title}>
      <span className="w-cell-value">{children}</span>
    </td>
  );
}

function Foot<Row>({ columns }: { columns: readonly Column<Row>[] }) {
  return (
    <tfoot>
      <tr>
        {columns.map((column, at) => (
          <Cell key={column.id} column={column} isHead={at === 0}>
            {column.foot}
          </Cell>
        ))}
      </tr>
    </tfoot>
  );
}
