import { useState, type ReactNode } from 'react'
import { groupFindings } from '#app/domain/rules/finding-groups.ts'
import { Tabs } from '#app/components/tabs.tsx'
import { HeaterSteppers } from '#app/editor/panels/heater-steppers.tsx'
import { Chosen, Explained, Findings, Heaters, Placing, Seats, type PartProps } from '#app/editor/side-parts.tsx'

type SheetTab = 'heater' | 'findings' | 'seats' | 'heaters' | 'section' | 'map' | 'add'

/** The sections for the sheet, drawn while their tab is open. */
export interface SheetSections {
  readonly drawn: ReactNode
  readonly onWanted: (wanted: boolean) => void
}

interface TouchSheetProps extends PartProps {
  readonly tools: ReactNode
  readonly sections: SheetSections
}

/** The sheet below the plan on a tablet: words as tabs, steppers for fingers. */
export function TouchSheet({ subject, tools, sections }: TouchSheetProps) {
  const { editor, figures, layout, site, readOnly } = subject
  const [tab, setTab] = useState<SheetTab>('heater')
  const open = groupFindings(figures.findings).filter(({ worst }) => worst.outcome !== 'pass').length
  const lead = layout.heaters.find(({ id }) => id === editor.state.selected[0])
  const pad = (panel: ReactNode) => <div className="h-47 overflow-y-auto">{panel}</div>
  const tabs: { value: SheetTab; label: ReactNode; panel: ReactNode }[] = [
    {
      value: 'heater',
      label: subject.explained ? `Seat ${subject.explained}` : lead ? `Heater ${lead.id}` : 'Heater',
      panel: pad(
        <>
          {lead && editor.state.selected.length === 1 && (
            <div className="px-4.5 pt-3.5">
              <HeaterSteppers
                heater={lead}
                model={editor.models.get(lead.model)}
                site={site}
                readOnly={readOnly}
                onNudge={editor.nudge}
              />
            </div>
          )}
          {subject.explained ? <Explained subject={subject} /> : <Chosen subject={subject} />}
        </>,
      ),
    },
    {
      value: 'findings',
      label: (
        <>
          Findings <b className="font-strong">{open}</b>
        </>
      ),
      panel: pad(<Findings subject={subject} />),
    },
    { value: 'seats', label: 'Seats', panel: pad(<Seats subject={subject} />) },
    { value: 'heaters', label: 'List', panel: pad(<Heaters subject={subject} />) },
    { value: 'section', label: 'Section', panel: <div className="h-47">{sections.drawn}</div> },
    { value: 'map', label: 'Map', panel: pad(tools) },
    ...(readOnly ? [] : [{ value: 'add' as const, label: 'Add', panel: pad(<Placing subject={subject} />) }]),
  ]
  const shown: SheetTab = subject.placing ? 'add' : subject.explained ? 'heater' : tab
  return (
    <div className="flex-none border-t border-rule bg-paper-raised">
      <Tabs
        label="Heater, findings and seats"
        tabs={tabs}
        value={shown}
        onChange={(next) => {
          subject.onPlacing(next === 'add')
          if (next !== 'heater') subject.onExplain(null)
          sections.onWanted(next === 'section')
          setTab(next)
        }}
      />
    </div>
  )
}
