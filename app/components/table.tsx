import { useState, type ReactNode } from 'react'
import { Icon } from '#app/components/icons.tsx'

/** A column of a table: its heading, the cell of a row, and what it sorts by (absent: it does not sort). */
export interface Column<Row> {
  key: string
  heading: ReactNode
  cell: (row: Row) => ReactNode
  sortBy?: (row: Row) => number | string | null
  numeric?: boolean
  /** The cell that names its row. */
  names?: boolean
  className?: string
}

interface Sort {
  key: string
  descending: boolean
}

interface DataTableProps<Row> {
  /** Says what the table holds; readers hear it first. */
  caption: string
  showCaption?: boolean
  columns: readonly Column<Row>[]
  rows: readonly Row[]
  rowKey: (row: Row) => string
  rowProps?: (row: Row) => Record<string, unknown>
  initialSort?: Sort
  empty?: ReactNode
}

function sorted<Row>(
  rows: readonly Row[],
  by: ((row: Row) => number | string | null) | undefined,
  descending: boolean,
) {
  if (!by) return rows
  const sign = descending ? -1 : 1
  return rows.toSorted((a, b) => {
    const [left, right] = [by(a), by(b)]
    if (left === null || right === null) return left === right ? 0 : left === null ? 1 : -1
    if (typeof left === 'number' && typeof right === 'number') return sign * (left - right)
    return sign * String(left).localeCompare(String(right), 'en', { numeric: true })
  })
}

function Heading<Row>({ column, sort, onSort }: { column: Column<Row>; sort: Sort | null; onSort: () => void }) {
  const here = sort?.key === column.key
  const align = column.numeric ? 'text-right' : 'text-left'
  return (
    <th
      scope="col"
      aria-sort={here ? (sort.descending ? 'descending' : 'ascending') : undefined}
      className={`px-2 pb-1.5 align-bottom text-2xs font-medium text-ink-3 first:pl-0 last:pr-0 ${align} ${column.className ?? ''}`}
    >
      {column.sortBy ? (
        <button type="button" onClick={onSort} className="inline-flex min-h-6 items-end gap-0.5 hover:text-ink">
          {column.heading}
          <span className={here ? 'text-ink' : 'opacity-0'}>
            <Icon name={here && sort.descending ? 'down' : 'up'} size={12} />
          </span>
        </button>
      ) : (
        column.heading
      )}
    </th>
  )
}

/** A real table: caption, headings that sort, hairlines. Empty figures sort last whichever way. */
export function DataTable<Row>(props: DataTableProps<Row>) {
  const { caption, showCaption = false, columns, rows, rowKey, rowProps, initialSort, empty } = props
  const [sort, setSort] = useState<Sort | null>(initialSort ?? null)
  const shown = sorted(rows, columns.find((column) => column.key === sort?.key)?.sortBy, sort?.descending ?? false)
  const toggle = (key: string) =>
    setSort((old) => (old?.key === key ? { key, descending: !old.descending } : { key, descending: false }))
  return (
    <table className="w-full border-collapse">
      <caption className={showCaption ? 'pb-2 text-left font-strong' : 'sr-only'}>{caption}</caption>
      <thead>
        <tr>
          {columns.map((column) => (
            <Heading key={column.key} column={column} sort={sort} onSort={() => toggle(column.key)} />
          ))}
        </tr>
      </thead>
      <tbody>
        {shown.map((row) => (
          <tr key={rowKey(row)} className="border-t border-rule" {...rowProps?.(row)}>
            {columns.map((column) => {
              const Cell = column.names ? 'th' : 'td'
              return (
                <Cell
                  key={column.key}
                  scope={column.names ? 'row' : undefined}
                  className={`px-2 py-1 align-middle font-regular first:pl-0 last:pr-0 ${column.numeric ? 'text-right whitespace-nowrap' : 'text-left'} ${column.names ? 'font-medium' : ''} ${column.className ?? ''}`}
                >
                  {column.cell(row)}
                </Cell>
              )
            })}
          </tr>
        ))}
        {shown.length === 0 && empty !== undefined && (
          <tr className="border-t border-rule">
            <td colSpan={columns.length} className="py-2 text-ink-3">
              {empty}
            </td>
          </tr>
        )}
      </tbody>
    </table>
  )
}
