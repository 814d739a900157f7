import { ArrowDown, ArrowUp } from 'lucide-react';
import type { ReactNode } from 'react';
import { Link, useSearchParams } from 'react-router';

export type Column<Row> = {
  key: string;
  label: string;
  cell: (row: Row) => ReactNode;
  sortable?: boolean;
  numeric?: boolean;
};

type Props<Row> = {
  caption: string;
  columns: Column<Row>[];
  rows: Row[];
  rowKey: (row: Row) => string | number;
  sort?: { by: string; down: boolean };
};

/** A table that sorts by its address; on a phone each row is a card with its labels. */
export function DataTable<Row>({ caption, columns, rows, rowKey, sort }: Props<Row>) {
  return (
    <table className="w-full border-collapse text-left">
      <caption className="sr-only">{caption}</caption>
      <thead className="max-sm:sr-only">
        <tr className="border-b border-edge">
          {columns.map((column) => (
            <th
              key={column.key}
              scope="col"
              className={`py-2 pr-4 text-sm font-semibold ${column.numeric ? 'text-right' : ''}`}
              aria-sort={sort?.by === column.key ? (sort.down ? 'descending' : 'ascending') : undefined}
            >
              {column.sortable ? (
                <SortLink column={column.key} label={column.label} sort={sort} />
              ) : (
                column.label
              )}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr key={rowKey(row)} className="border-b border-line align-top max-sm:block max-sm:py-3">
            {columns.map((column, place) =>
              place === 0 ? (
                <th
                  key={column.key}
                  scope="row"
                  className="py-3 pr-4 font-semibold max-sm:block max-sm:py-0.5"
                >
                  {column.cell(row)}
                </th>
              ) : (
                <td
                  key={column.key}
                  className={`py-3 pr-4 max-sm:flex max-sm:gap-2 max-sm:py-0.5 ${column.numeric ? 'figures sm:text-right' : ''}`}
                >
                  <span className="w-28 shrink-0 text-sm text-muted sm:hidden" aria-hidden>
                    {column.label}
                  </span>
                  <span className="min-w-0 break-words">{column.cell(row)}</span>
                </td>
              ),
            )}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function SortLink({
  column,
  label,
  sort,
}: {
  column: string;
  label: string;
  sort?: { by: string; down: boolean };
}) {
  const [params] = useSearchParams();
  const next = new URLSearchParams(params);
  const active = sort?.by === column;
  next.set('sort', active && !sort?.down ? `-${column}` : column);
  next.delete('page');
  const Arrow = sort?.down ? ArrowDown : ArrowUp;
  return (
    <Link
      to={`?${next}`}
      className="inline-flex min-h-11 items-center gap-1 hover:text-action"
      preventScrollReset
    >
      {label}
      {active && <Arrow className="size-4" aria-hidden />}
    </Link>
  );
}
