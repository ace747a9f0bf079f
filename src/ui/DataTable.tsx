import { ArrowDown, ArrowUp } from 'lucide-react';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';

export type Column<Row> = {
  title: string;
  cell: (row: Row) => ReactNode;
  /** The name under which the URL sorts by it; a column without one can't be sorted. */
  sort?: string;
  /** Left out on a narrow screen. */
  wide?: boolean;
  numeric?: boolean;
};

type DataTableProps<Row> = {
  label: string;
  rows: Row[];
  columns: Column<Row>[];
  keyOf: (row: Row) => string;
  /** The page that a row opens; its first cell becomes the link. */
  linkOf?: (row: Row) => string;
  empty: ReactNode;
  sort?: { by: string; direction: 'up' | 'down'; onChange: (by: string, direction: 'up' | 'down') => void };
};

/** A register: dense rows, a heading that stays, sort in the URL. */
export function DataTable<Row>({ label, rows, columns, keyOf, linkOf, empty, sort }: DataTableProps<Row>) {
  if (rows.length === 0) return <div className="border-t border-zinc py-6 text-ink-soft">{empty}</div>;
  const hidden = (column: Column<Row>) => (column.wide ? 'hidden md:table-cell' : '');
  return (
    <div className="overflow-x-auto">
      <table aria-label={label} className="w-full border-collapse text-left tabular-nums">
        <thead>
          <tr>
            {columns.map((column) => (
              <th
                key={column.title}
                scope="col"
                aria-sort={
                  sort && sort.by === column.sort
                    ? sort.direction === 'up'
                      ? 'ascending'
                      : 'descending'
                    : undefined
                }
                className={`sticky top-0 border-b-2 border-zinc bg-paper px-2 py-1.5 text-sm font-medium text-ink-soft ${hidden(column)}`}
              >
                {column.sort && sort ? (
                  <SortButton column={column.sort} title={column.title} sort={sort} />
                ) : (
                  column.title
                )}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={keyOf(row)} className="border-b border-zinc hover:bg-chalk-wash">
              {columns.map((column, index) => (
                <td
                  key={column.title}
                  className={`px-2 py-1.5 align-top pointer-coarse:py-2.5 ${column.numeric ? 'text-right' : ''} ${hidden(column)}`}
                >
                  {index === 0 && linkOf ? (
                    <Link to={linkOf(row)} className="inline-block min-h-6 font-medium pointer-coarse:py-1">
                      {column.cell(row)}
                    </Link>
                  ) : (
                    column.cell(row)
                  )}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function SortButton<Row>({
  column,
  title,
  sort,
}: {
  column: string;
  title: string;
  sort: NonNullable<DataTableProps<Row>['sort']>;
}) {
  const active = sort.by === column;
  const Icon = sort.direction === 'up' ? ArrowUp : ArrowDown;
  return (
    <button
      type="button"
      className="inline-flex items-center gap-1 hover:text-chalk"
      onClick={() => sort.onChange(column, active && sort.direction === 'up' ? 'down' : 'up')}
    >
      {title}
      {active ? <Icon size={14} strokeWidth={1.75} aria-hidden /> : null}
    </button>
  );
}
