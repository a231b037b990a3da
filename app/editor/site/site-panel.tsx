import { useState, type ReactNode } from 'react'
import type { Site } from '#app/domain/site/site.ts'
import { Button } from '#app/components/button.tsx'
import { Tabs } from '#app/components/tabs.tsx'
import type { Chosen } from '#app/editor/site/chosen.ts'
import {
  CoversTable,
  FixturesTable,
  MembersTable,
  ObstaclesTable,
  SeatsTable,
  SizesTable,
} from '#app/editor/site/site-tables.tsx'
import { SizeFields } from '#app/editor/site/size-fields.tsx'

interface SiteTablesProps {
  site: Site
  chosen: Chosen | null
  readOnly: boolean
  onChange: (edit: (site: Site) => Site) => void
  onChoose: (chosen: Chosen, shift: boolean) => void
  onAdd: (kind: 'seat' | 'member') => void
}

type TabName = 'seats' | 'members' | 'cover' | 'obstacles' | 'fixtures' | 'sizes'

/** Everything of the site in tables, one behind each tab. */
export function SiteTables({ site, chosen, readOnly, onChange, onChoose, onAdd }: SiteTablesProps) {
  const [open, setOpen] = useState<TabName>('seats')
  const [sizeId, setSizeId] = useState<string | null>(null)
  const size = site.dimensions.find(({ id }) => id === sizeId)
  const add = (kind: 'seat' | 'member', words: string) =>
    !readOnly && (
      <p className="pt-3">
        <Button icon="plus" onClick={() => onAdd(kind)}>
          {words}
        </Button>
      </p>
    )
  const label = (words: string, count: number) => (
    <>
      {words} <span className="text-ink-3">{count}</span>
    </>
  )
  const choosing = { site, chosen, onChoose }
  const tabs = [
    {
      value: 'seats',
      label: label('Seats', site.seats.length),
      panel: (
        <>
          <SeatsTable {...choosing} />
          {add('seat', 'Add a seat in the middle')}
        </>
      ),
    },
    {
      value: 'members',
      label: label('Members', site.members.length),
      panel: (
        <>
          <MembersTable {...choosing} />
          {add('member', 'Add a member in the middle')}
        </>
      ),
    },
    { value: 'cover', label: label('Cover', site.covers.length), panel: <CoversTable site={site} /> },
    { value: 'obstacles', label: label('Obstacles', site.obstacles.length), panel: <ObstaclesTable site={site} /> },
    {
      value: 'fixtures',
      label: label('Tables and walls', site.tables.length + site.walls.length + site.poles.length),
      panel: <FixturesTable site={site} />,
    },
    {
      value: 'sizes',
      label: label('Sizes', site.dimensions.length),
      panel: (
        <>
          {size && (
            <div className="pb-4">
              <SizeFields {...{ site, size, readOnly, onChange }} onClose={() => setSizeId(null)} />
            </div>
          )}
          <SizesTable site={site} chosen={sizeId} onChoose={setSizeId} />
        </>
      ),
    },
  ] as const
  return (
    <Tabs
      label="Tables of the site"
      value={open}
      onChange={setOpen}
      tabs={tabs.map((tab) => ({ ...tab, panel: <Scrolling>{tab.panel}</Scrolling> }))}
    />
  )
}

/** Tables wider than the page are moved sideways, by the keyboard too. */
function Scrolling({ children }: { children: ReactNode }) {
  return (
    <div className="overflow-x-auto pt-3" tabIndex={0} role="group" aria-label="Table">
      {children}
    </div>
  )
}
