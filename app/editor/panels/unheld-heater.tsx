import type { Brief } from '#app/domain/brief/brief.ts'
import { layoutChange } from '#app/domain/comparison/changed-seats.ts'
import { obstructionsOf } from '#app/domain/flux/shading.ts'
import type { MountedHeater, Layout } from '#app/domain/layout/layout.ts'
import { remediesOf, withoutRails, withRails, type RailedHeater } from '#app/domain/layout/remedies.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import { useToast } from '#app/components/toast.tsx'
import { SupportRemedies } from '#app/editor/panels/support-remedies.tsx'
import type { ChangeSite, SiteSaved } from '#app/editor/site-change.ts'
import type { Editor } from '#app/editor/use-editor.ts'
import type { ViewChoice } from '#app/editor/view-choice.ts'

/** The layout with one heater put in place of the one of its name. */
const withHeater = (layout: Layout, heater: MountedHeater): Layout => ({
  ...layout,
  heaters: layout.heaters.map((each) => (each.id === heater.id ? heater : each)),
})

/** Why a change of the site was not kept, in a sentence; null when it was. */
function reasonOf(answer: SiteSaved): string | null {
  switch (answer.kind) {
    case 'saved':
      return null
    case 'refused':
      return answer.reason
    case 'unreachable':
      return 'No connection. The site was not changed.'
    case 'changed elsewhere':
      return `${answer.by ?? 'Somebody'} changed the site meanwhile; it is shown as it now is, and nothing of yours was done to it. Look again.`
  }
}

/** After a remedy its buttons are gone: the reader goes on from the head of the findings. */
const goToFindings = () => document.getElementById('findings-title')?.focus()

interface UnheldHeaterProps {
  readonly heater: MountedHeater
  readonly editor: Editor
  readonly site: Site
  readonly brief: Brief
  readonly choice: ViewChoice
  readonly onSite: ChangeSite
}

/** The two remedies of a heater that nothing holds. */
export function UnheldHeater({ heater, editor, site, brief, choice, onSite }: UnheldHeaterProps) {
  const toast = useToast()
  const model = editor.models.get(heater.model)
  if (!model) return null
  const layout = editor.state.history.present
  const remedies = remediesOf(site, heater, model, editor.house.rules)
  const { move } = remedies
  const changeOf = () => {
    const shade = choice.shade ? { obstructions: obstructionsOf(site, layout, editor.models) } : {}
    const input = { site, brief, layout, models: editor.models, ...shade }
    return layoutChange(input, move ? withHeater(layout, move.heater) : layout)
  }
  const onMove = () => {
    if (!move) return
    const said = `Heater ${heater.id} moved ${formatLength(move.distance, site.displayUnits)} to ${move.supportName}`
    editor.edit(withHeater(layout, move.heater), [heater.id], said)
    goToFindings()
  }
  const undo = async ({ rails }: RailedHeater) => {
    const why = reasonOf(await onSite((now) => withoutRails(now, rails)))
    if (why) return toast({ text: `The rail stays: ${why}` })
    editor.set([heater.id], { memberId: heater.memberId })
  }
  const onRails = async (): Promise<string | null> => {
    const { rails: railed } = remedies
    if (!railed) return null
    const why = reasonOf(await onSite((now) => withRails(now, railed.rails)))
    if (why) return why
    const names = railed.rails.map(({ name }) => name).join(' and ')
    editor.set([heater.id], { memberId: railed.heater.memberId, ...(heater.splayed ? { splayed: false } : {}) })
    toast({
      text: `${names} added to the site, span and load to be confirmed`,
      action: { label: 'Undo', run: () => void undo(railed) },
    })
    goToFindings()
    return null
  }
  return (
    <SupportRemedies
      heaterId={heater.id}
      {...{ remedies, site, changeOf, onMove, onRails }}
      fluxUnit={choice.fluxUnit}
    />
  )
}
