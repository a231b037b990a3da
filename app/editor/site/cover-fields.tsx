import { coverPlane, coverSlope, coverWarp, planeHeightAt } from '#app/domain/site/cover.ts'
import { changeCover } from '#app/domain/site/edits.ts'
import { refusalOf } from '#app/domain/site/site-faults.ts'
import type { Cover, Site } from '#app/domain/site/site.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'
import { slopeText } from '#app/drawing/plan/cover-mark.tsx'
import { Button } from '#app/components/button.tsx'
import { CheckField } from '#app/components/field.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { MaterialInput, TextInput } from '#app/editor/site/fact-inputs.tsx'
import { FieldGrid, FieldsFrame } from '#app/editor/site/fields-frame.tsx'
import { SizeInput } from '#app/editor/site/size-input.tsx'

/** What the corners make of the cover: its slope, and how far the fourth lies off the plane of the other three. */
function planeWords(cover: Cover, units: DisplayUnits): string {
  if (!coverSlope(cover)) return 'These corners make no plane.'
  const warp = coverWarp(cover) ?? 0
  const slope = `Slope ${slopeText(cover)}.`
  if (cover.corners.length < 4) return `${slope} Three corners make the plane.`
  if (Math.abs(warp) < 0.0005) return `${slope} The fourth corner lies on the plane of the first three.`
  return `${slope} The fourth corner lies ${formatLength(Math.abs(warp), units)} ${warp > 0 ? 'above' : 'below'} the plane of the first three; the plane counts.`
}

/** A plane over the floor: its corners with their heights, and every other fact of it. */
export function CoverFields({ cover, onRemove }: { cover: Cover; onRemove: () => void }) {
  const { site, readOnly, change } = useSiteEditing()
  const { id, corners } = cover
  const set = (facts: Partial<Omit<Cover, 'id'>>) => change((old) => changeCover(old, id, facts))
  return (
    <FieldsFrame title={cover.name} note={planeWords(cover, site.displayUnits)} onRemove={onRemove}>
      <div key={id} className="space-y-3">
        <Corners cover={cover} />
        {!readOnly && <CornerButtons cover={cover} onSet={(next) => set({ corners: next })} />}
        <FieldGrid>
          <TextInput label="Name" value={cover.name} edit={(old, name) => changeCover(old, id, { name })} />
          <MaterialInput value={cover.material} edit={(old, material) => changeCover(old, id, { material })} />
          <SizeInput
            label="Void above"
            value={cover.voidDepth}
            min={0.001}
            max={5}
            hint="Clear depth, for recess boxes"
            edit={(old, voidDepth) => changeCover(old, id, { voidDepth })}
          />
          <CheckField
            label="Opens: rain comes in"
            checked={cover.opening}
            disabled={readOnly}
            onChange={(event) => set({ opening: event.target.checked, swing: event.target.checked ? cover.swing : 0 })}
          />
          {cover.opening && (
            <SizeInput
              label="Blades reach down"
              value={cover.swing}
              min={0}
              max={2}
              edit={(old, swing) => changeCover(old, id, { swing })}
            />
          )}
          <TextInput
            label="Note"
            value={cover.note ?? ''}
            edit={(old, note) => changeCover(old, id, { note: note || null })}
          />
        </FieldGrid>
        <p className="text-xs text-ink-3">
          {corners.length} corners in order around the cover. Drag them, or choose one and use the arrows.
        </p>
      </div>
    </FieldsFrame>
  )
}

type Corner = Cover['corners'][number]

function withNumber(site: Site, id: string, corner: number, axis: 0 | 1 | 2, metres: number): Site {
  return changeCover(site, id, ({ corners }) => ({
    corners: corners.map(([x, y, z], i): Corner => {
      if (i !== corner) return [x, y, z]
      return axis === 0 ? [metres, y, z] : axis === 1 ? [x, metres, z] : [x, y, metres]
    }),
  }))
}

function Corners({ cover: { id, corners } }: { cover: Cover }) {
  const axes = [
    ['x', 0],
    ['y', 1],
    ['height', 2],
  ] as const
  return (
    <div className="grid grid-cols-3 items-start gap-x-3 gap-y-2">
      {corners.map((corner, i) =>
        axes.map(([word, axis]) => (
          <SizeInput
            key={`${i} ${word}`}
            label={`Corner ${i + 1} ${word}`}
            value={corner[axis]}
            {...(axis === 2 && { min: -10, max: 100 })}
            edit={(old, metres) => withNumber(old, id, i, axis, metres)}
          />
        )),
      )}
    </div>
  )
}

function CornerButtons({ cover, onSet }: { cover: Cover; onSet: (corners: Corner[]) => void }) {
  const { site } = useSiteEditing()
  const { corners } = cover
  const plane = coverPlane(cover)
  const [a, b, c] = corners
  if (corners.length === 4) {
    const three = corners.slice(0, 3)
    const refusal = refusalOf(site, changeCover(site, cover.id, { corners: three }))
    return (
      <Button size="small" kind="text" disabled={refusal !== null} onClick={() => onSet(three)}>
        Without the fourth corner
      </Button>
    )
  }
  if (!a || !b || !c) return null
  const [x, y] = [a[0] + c[0] - b[0], a[1] + c[1] - b[1]]
  const fourth: Corner = [x, y, plane ? planeHeightAt(plane, x, y) : c[2]]
  return (
    <Button size="small" kind="text" icon="plus" onClick={() => onSet([...corners, fourth])}>
      A fourth corner
    </Button>
  )
}
