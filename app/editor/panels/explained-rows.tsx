/** A small table of three columns: a name, a figure, a word about it. Nothing without rows. */
export function ExplainedRows({
  caption,
  rows,
}: {
  caption: string
  rows: readonly (readonly [string, string, string])[]
}) {
  if (rows.length === 0) return null
  return (
    <table className="mt-2 w-full border-collapse">
      <caption className="pb-1 text-left text-2xs text-ink-3">{caption}</caption>
      <tbody>
        {rows.map(([name, middle, last]) => (
          <tr key={name} className="border-t border-rule">
            <th scope="row" className="py-0.5 pr-2 text-left font-medium">
              {name}
            </th>
            <td className="py-0.5 pr-2 text-right whitespace-nowrap">{middle}</td>
            <td className={`py-0.5 text-right text-ink-2 ${last.length < 16 ? 'whitespace-nowrap' : ''}`}>{last}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
