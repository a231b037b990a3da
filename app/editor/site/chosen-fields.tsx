import type { Site } from '#app/domain/site/site.ts'
import type { Chosen } from '#app/editor/site/choice.ts'
import { kindWords } from '#app/editor/site/chosen.ts'
import { CoverFields } from '#app/editor/site/cover-fields.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { FieldsFrame } from '#app/editor/site/fields-frame.tsx'
import { FloorFields, LevelFields } from '#app/editor/site/floor-fields.tsx'
import { MemberFields } from '#app/editor/site/member-fields.tsx'
import { ObstacleFields } from '#app/editor/site/obstacle-fields.tsx'
import { SeatFields } from '#app/editor/site/seat-fields.tsx'
import { PoleFields, WallFields } from '#app/editor/site/support-fields.tsx'
import { TableFields } from '#app/editor/site/table-fields.tsx'

interface ChosenFieldsProps {
  readonly chosen: Chosen
  readonly onChoose: (chosen: Chosen) => void
  readonly onRemove: () => void
}

/** The one set of fields: of what is chosen. */
export function ChosenFields({ chosen, onChoose, onRemove }: ChosenFieldsProps) {
  const { site } = useSiteEditing()
  const { kind, ids } = chosen
  if (kind === 'floor') return <FloorFields {...{ chosen, onChoose }} />
  if (kind === 'seat') return <SeatFields {...{ ids, onRemove }} />
  const [id] = ids
  if (ids.length > 1 || id === undefined)
    return (
      <FieldsFrame title={`${ids.length} ${kindWords[kind][1]}`} onRemove={onRemove}>
        <p className="text-ink-2">They move together. Choose one to see its fields.</p>
      </FieldsFrame>
    )
  return <FieldsOfOne {...{ site, chosen, id, onChoose, onRemove }} />
}

interface OneProps extends ChosenFieldsProps {
  readonly site: Site
  readonly id: string
}

function FieldsOfOne({ site, chosen, id, onChoose, onRemove }: OneProps) {
  const called = <T extends { readonly id: string }>(things: readonly T[]) => things.find((thing) => thing.id === id)
  switch (chosen.kind) {
    case 'cover': {
      const cover = called(site.covers)
      return cover ? <CoverFields {...{ cover, onRemove }} /> : null
    }
    case 'member': {
      const member = called(site.members)
      return member ? <MemberFields {...{ member, onRemove }} /> : null
    }
    case 'wall': {
      const wall = called(site.walls)
      return wall ? <WallFields {...{ wall, onRemove }} /> : null
    }
    case 'pole': {
      const pole = called(site.poles)
      return pole ? <PoleFields {...{ pole, onRemove }} /> : null
    }
    case 'obstacle': {
      const obstacle = called(site.obstacles)
      return obstacle ? <ObstacleFields {...{ obstacle, chosen, onChoose, onRemove }} /> : null
    }
    case 'table': {
      const table = called(site.tables)
      return table ? <TableFields {...{ table, onChoose, onRemove }} /> : null
    }
    case 'level': {
      const level = called(site.levels)
      return level ? <LevelFields {...{ level, chosen, onChoose, onRemove }} /> : null
    }
    default:
      return null
  }
}
