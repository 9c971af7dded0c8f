/** Tables: hairline rows, heads that sort and say so, copy and CSV at the caption. */
import { useMemo, useState } from 'react';
import type { ReactNode } from 'react';
import { QuietButton } from './Button.tsx';
import { classes } from './classes.ts';
import { useMessages } from './messages.ts';

export interface Column<Row> {
  readonly key: string;
  readonly head: string;
  /** The value by which the column sorts and which is copied. */
  readonly value: (row: Row) => string | number | null;
  /** What is shown, where it is more than the value. */
  readonly cell?: (row: Row) => ReactNode;
  readonly isNumeric?: boolean;
  readonly unit?: string;
  /** Hidden where the window is narrow. */
  readonly isMinor?: boolean;
}

interface DataTableProps<Row> {
  readonly caption: string;
  readonly columns: readonly Column<Row>[];
  readonly rows: readonly Row[];
  readonly rowKey: (row: Row) => string;
  /** Names the file of the CSV. */
  readonly fileName?: string;
  readonly isCaptionHidden?: boolean;
}

type Order = { readonly key: string; readonly direction: 'ascending' | 'descending' };

/** Values separated by `separator`; a value is quoted where the separator would be misread. */
export function tabulate<Row>(
  columns: readonly Column<Row>[],
  rows: readonly Row[],
  separator: ',' | '\t',
): string {
  const quote = (value: string | number | null): string => {
    if (value === null) return '';
    if (typeof value === 'number') return String(value);
    // A spreadsheet would take a text that begins like this for a formula.
    const text = /^[=+\-@]/.test(value) ? `'${value}` : value;
    return /[",\t\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
  };
  const head = columns.map(({ head, unit }) => quote(unit ? `${head} [${unit}]` : head));
  const body = rows.map((row) => columns.map((column) => quote(column.value(row))));
  return [head, ...body].map((line) => line.join(separator)).join('\n') + '\n';
}

function compare(a: string | number | null, b: string | number | null): number {
  if (a === b) return 0;
  if (a === null) return 1;
  if (b === null) return -1;
  if (typeof a === 'number' && typeof b === 'number') return a - b;
  return String(a).localeCompare(String(b), 'en', { numeric: true });
}

export function DataTable<Row>({
  caption,
  columns,
  rows,
  rowKey,
  fileName,
  isCaptionHidden = false,
}: DataTableProps<Row>) {
  const [order, setOrder] = useState<Order>();
  const { say } = useMessages();

  const sorted = useMemo(() => {
    const column = columns.find(({ key }) => key === order?.key);
    if (!column || !order) return rows;
    const sign = order.direction === 'ascending' ? 1 : -1;
    return [...rows].sort((a, b) => sign * compare(column.value(a), column.value(b)));
  }, [columns, order, rows]);

  const turn = (key: string) =>
    setOrder((current) => ({
      key,
      direction:
        current?.key === key && current.direction === 'ascending' ? 'descending' : 'ascending',
    }));

  const copy = async () => {
    await navigator.clipboard.writeText(tabulate(columns, sorted, '\t'));
    say('Copied, ready to paste into a spreadsheet.');
  };
  const save = () => {
    const address = URL.createObjectURL(
      new Blob([tabulate(columns, sorted, ',')], { type: 'text/csv;charset=utf-8' }),
    );
    const link = document.createElement('a');
    link.href = address;
    link.download = `${fileName ?? 'table'}.csv`;
    link.click();
    URL.revokeObjectURL(address);
  };

  return (
    <div>
      <div className="text-label text-ink-3 flex items-center gap-10 pt-12 pb-4 font-mono">
        {/* The caption itself belongs to the table; this is its picture beside the controls. */}
        {!isCaptionHidden && <span aria-hidden="true">{caption}</span>}
        <span className="flex-1" />
        {rows.length > 0 && (
          <>
            <QuietButton onClick={() => void copy()} aria-label={`Copy the table: ${caption}`}>
              Copy
            </QuietButton>
            <QuietButton onClick={save} aria-label={`Save as CSV: ${caption}`}>
              CSV
            </QuietButton>
          </>
        )}
      </div>
      <div className="overflow-x-auto">
        <table className="border-rule text-label w-full border-collapse border-t font-mono">
          <caption className="sr-only">{caption}</caption>
          <thead>
            <tr>
              {columns.map((column) => {
                const direction = order?.key === column.key ? order.direction : 'none';
                return (
                  <th
                    key={column.key}
                    scope="col"
                    aria-sort={direction}
                    className={classes(
                      'text-ink-3 py-4 pr-12 font-normal',
                      column.isNumeric ? 'text-right' : 'text-left',
                      column.isMinor && 'max-desk:hidden',
                    )}
                  >
                    <button
                      type="button"
                      onClick={() => turn(column.key)}
                      className="text-ink-3 hover:text-ink min-h-28"
                    >
                      {column.head}
                      {column.unit && ` / ${column.unit}`}
                      <span aria-hidden="true">
                        {direction === 'ascending' ? ' ↑' : direction === 'descending' ? ' ↓' : ''}
                      </span>
                    </button>
                  </th>
                );
              })}
            </tr>
          </thead>
          <tbody>
            {sorted.map((row) => (
              <tr key={rowKey(row)} className="border-hair border-t">
                {columns.map((column) => (
                  <td
                    key={column.key}
                    className={classes(
                      'text-ink-2 py-8 pr-12 align-baseline',
                      column.isNumeric ? 'text-right tabular-nums' : 'text-left',
                      column.isMinor && 'max-desk:hidden',
                    )}
                  >
                    {column.cell ? column.cell(row) : column.value(row)}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </div>
  );
}
