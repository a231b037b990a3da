import { coverSlope, coverWarp } from '#app/domain/site/cover.ts'
import { memberLength, undersideAt } from '#app/domain/site/member.ts'
import type { Cover, Dimension, Member, Obstacle, Seat, Site } from '#app/domain/site/site.ts'
import { formatLength, formatQuantity } from '#app/domain/units.ts'
import { DataTable, type Column } from '#app/components/table.tsx'
import type { Chosen } from '#app/editor/site/chosen.ts'

interface TableProps {
  readonly site: Site
}

interface ChoosingProps extends TableProps {
  readonly chosen: Chosen | null
  readonly onChoose: (chosen: Chosen, shift: boolean) => void
}

/** The button that chooses a row's thing on the plan; Shift adds to the choice. */
function RowName({ name, here, onChoose }: { name: string; here: boolean; onChoose: (shift: boolean) => void }) {
  return (
    <button
      type="button"
      aria-pressed={here}
      onClick={(event) => onChoose(event.shiftKey)}
      className="min-h-6 text-left font-medium underline decoration-rule-strong underline-offset-2 hover:decoration-ink pointer-coarse:min-h-11"
    >
      {name}
    </button>
  )
}

const rowMark = (here: boolean) => (here ? { className: 'border-t border-rule bg-ember-wash' } : {})

/** Every seat: group, priority, place, direction and heights. */
export function SeatsTable({ site, chosen, onChoose }: ChoosingProps) {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const here = (id: string) => chosen?.kind === 'seat' && chosen.ids.includes(id)
  const columns: Column<Seat>[] = [
    {
      key: 'id',
      heading: 'Seat',
      names: true,
      sortBy: ({ id }) => id,
      cell: ({ id }) => (
        <RowName name={id} here={here(id)} onChoose={(shift) => onChoose({ kind: 'seat', ids: [id] }, shift)} />
      ),
    },
    { key: 'group', heading: 'Group', sortBy: ({ group }) => group, cell: ({ group }) => group || '–' },
    { key: 'priority', heading: 'Counts as', sortBy: ({ priority }) => priority, cell: ({ priority }) => priority },
    { key: 'x', heading: 'Along', numeric: true, sortBy: ({ x }) => x, cell: ({ x }) => length(x) },
    { key: 'y', heading: 'Away', numeric: true, sortBy: ({ y }) => y, cell: ({ y }) => length(y) },
    {
      key: 'facing',
      heading: 'Looks',
      numeric: true,
      cell: ({ facingDeg }) => `${String(facingDeg).replace('-', '−')}°`,
    },
    { key: 'body', heading: 'Body', numeric: true, cell: ({ bodyHeight }) => length(bodyHeight) },
    { key: 'head', heading: 'Head', numeric: true, cell: ({ headHeight }) => length(headHeight) },
  ]
  return (
    <DataTable
      caption="Seats with their places"
      columns={columns}
      rows={site.seats}
      rowKey={({ id }) => id}
      rowProps={({ id }) => rowMark(here(id))}
      empty="No seats yet. Add one on the plan."
    />
  )
}

function undersideWords(site: Site, member: Member): string {
  const ends = [member.from, member.to].map(([x, y]) => undersideAt(site, member, x, y))
  const [from, to] = ends.map((height) => (height === null ? 'not known' : formatLength(height, site.displayUnits)))
  return from === to ? `${from}` : `${from} to ${to}`
}

/** Every member: its run, the height of its underside, its section, material and what it may carry. */
export function MembersTable({ site, chosen, onChoose }: ChoosingProps) {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const here = (id: string) => chosen?.kind === 'member' && chosen.id === id
  const columns: Column<Member>[] = [
    {
      key: 'name',
      heading: 'Member',
      names: true,
      sortBy: ({ name }) => name,
      cell: ({ id, name }) => (
        <RowName name={name} here={here(id)} onChoose={(shift) => onChoose({ kind: 'member', id }, shift)} />
      ),
    },
    { key: 'kind', heading: 'Kind', cell: ({ kind }) => kind },
    { key: 'x', heading: 'At x', numeric: true, sortBy: ({ from }) => from[0], cell: ({ from }) => length(from[0]) },
    { key: 'length', heading: 'Long', numeric: true, sortBy: memberLength, cell: (m) => length(memberLength(m)) },
    { key: 'underside', heading: 'Underside', cell: (member) => undersideWords(site, member) },
    { key: 'material', heading: 'Material', cell: ({ material }) => material },
    {
      key: 'load',
      heading: 'Load per point',
      cell: ({ allowedPointLoad, loadStatus }) =>
        allowedPointLoad === null ? loadStatus : formatQuantity(allowedPointLoad, 'force', site.displayUnits),
    },
  ]
  return (
    <DataTable
      caption="Members: beams, rafters, joists and purlins"
      columns={columns}
      rows={site.members}
      rowKey={({ id }) => id}
      rowProps={({ id }) => rowMark(here(id))}
      empty="No members yet. A heater needs one, a wall or a pole to hang from."
    />
  )
}

function slopeWords(cover: Cover): string {
  const slope = coverSlope(cover)
  if (!slope) return 'Three heights in one line do not make a plane. Give a fourth corner.'
  if (slope.fall < 1e-9) return 'level'
  return `${((slope.angle * 180) / Math.PI).toFixed(1)}°, ${(12 * slope.fall).toFixed(2)} in/ft`
}

/** Covers as planes from corner heights, with their slope in degrees and in inches per foot. */
export function CoversTable({ site }: TableProps) {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const columns: Column<Cover>[] = [
    { key: 'name', heading: 'Cover', names: true, cell: ({ name }) => name },
    {
      key: 'heights',
      heading: 'Corner heights',
      cell: ({ corners }) => corners.map(([, , height]) => length(height)).join(', '),
    },
    { key: 'slope', heading: 'Slope', cell: slopeWords },
    {
      key: 'warp',
      heading: 'Fourth corner off the plane',
      numeric: true,
      cell: (cover) => {
        const warp = coverWarp(cover)
        return warp === null ? '–' : length(warp)
      },
    },
    { key: 'material', heading: 'Material', cell: ({ material }) => material },
    {
      key: 'opening',
      heading: 'Opens',
      cell: ({ opening, swing }) =>
        opening ? `yes${swing > 0 ? `, blades reach ${length(swing)} down` : ''}` : 'no, closed',
    },
  ]
  return (
    <DataTable
      caption="Covers over the floor"
      columns={columns}
      rows={site.covers}
      rowKey={({ id }) => id}
      empty="No cover: open sky."
    />
  )
}

function shapeWords({ shape }: Obstacle, length: (metres: number) => string): string {
  const [low, high] = shape.z
  const heights = `${length(low)} to ${length(high)} high`
  if (shape.kind === 'cylinder') return `round, ${length(2 * shape.radius)} across, ${heights}`
  if (shape.kind === 'prism') return `${shape.outline.length} corners, ${heights}`
  return `${length(shape.x[1] - shape.x[0])} × ${length(shape.y[1] - shape.y[0])}, ${heights}`
}

/** What stands in the way, combustible or not, fixed or movable. */
export function ObstaclesTable({ site }: TableProps) {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const columns: Column<Obstacle>[] = [
    { key: 'name', heading: 'Obstacle', names: true, sortBy: ({ name }) => name, cell: ({ name }) => name },
    { key: 'kind', heading: 'Kind', sortBy: ({ kind }) => kind, cell: ({ kind }) => kind },
    { key: 'shape', heading: 'Size', cell: (obstacle) => shapeWords(obstacle, length) },
    {
      key: 'material',
      heading: 'Material',
      cell: ({ material }) => (material === 'unknown' ? 'unknown, judged combustible' : material),
    },
    { key: 'movable', heading: 'Movable', cell: ({ movable }) => (movable ? 'yes, judged in every state' : 'no') },
  ]
  return (
    <DataTable
      caption="Obstacles"
      columns={columns}
      rows={site.obstacles}
      rowKey={({ id }) => id}
      empty="No obstacles known."
    />
  )
}

/** Tables, walls and poles in one list. */
export function FixturesTable({ site }: TableProps) {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const rows = [
    ...site.walls.map(({ id, name, from, to, top, material, loadStatus }) => ({
      id,
      name,
      kind: 'wall',
      size: `${length(Math.hypot(to[0] - from[0], to[1] - from[1]))} long, ${top === null ? 'past the cover' : `${length(top)} high`}`,
      material,
      load: loadStatus,
    })),
    ...site.poles.map(({ id, name, diameter, top, material, loadStatus }) => ({
      id,
      name,
      kind: 'pole',
      size: `${length(diameter)} across, ${length(top)} high`,
      material,
      load: loadStatus,
    })),
    ...site.tables.map(({ id, size, height, material }) => ({
      id,
      name: id,
      kind: 'table',
      size: `${length(size[0])} × ${length(size[1])}, ${length(height)} high`,
      material,
      load: '–',
    })),
  ]
  type Row = (typeof rows)[number]
  const columns: Column<Row>[] = [
    { key: 'name', heading: 'Name', names: true, sortBy: ({ name }) => name, cell: ({ name }) => name },
    { key: 'kind', heading: 'Kind', sortBy: ({ kind }) => kind, cell: ({ kind }) => kind },
    { key: 'size', heading: 'Size', cell: ({ size }) => size },
    { key: 'material', heading: 'Material', cell: ({ material }) => material },
    { key: 'load', heading: 'What it may carry', cell: ({ load }) => load },
  ]
  return (
    <DataTable caption="Walls, poles and tables" columns={columns} rows={rows} rowKey={({ id }) => id} empty="None." />
  )
}

interface SizesProps extends TableProps {
  readonly chosen: string | null
  readonly onChoose: (id: string) => void
}

/** Every named size with its tolerance, as it goes into the margins, and where it came from. */
export function SizesTable({ site, chosen, onChoose }: SizesProps) {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const columns: Column<Dimension>[] = [
    {
      key: 'label',
      heading: 'Size',
      names: true,
      sortBy: ({ label }) => label,
      cell: ({ id, label }) => <RowName name={label} here={chosen === id} onChoose={() => onChoose(id)} />,
    },
    {
      key: 'value',
      heading: 'Value',
      numeric: true,
      sortBy: ({ value }) => value,
      cell: ({ value, tolerance }) => `${length(value)} ± ${length(tolerance)}`,
    },
    {
      key: 'share',
      heading: '±, %',
      numeric: true,
      sortBy: ({ value, tolerance }) => tolerance / Math.abs(value),
      cell: ({ value, tolerance }) => ((100 * tolerance) / Math.abs(value)).toFixed(1),
    },
    { key: 'source', heading: 'Source', sortBy: ({ source }) => source, cell: ({ source }) => source },
    { key: 'note', heading: 'Note', cell: ({ note }) => note ?? '–' },
  ]
  return (
    <DataTable
      caption="Sizes with their tolerances and sources"
      columns={columns}
      rows={site.dimensions}
      rowKey={({ id }) => id}
      rowProps={({ id }) => rowMark(chosen === id)}
      empty="No named sizes: every coordinate counts as ± 25 mm."
    />
  )
}
