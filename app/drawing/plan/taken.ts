import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { heaterNameAt, heaterPatch, heaterPlace } from '#app/drawing/plan/heater-place.ts'
import { takenByOverall } from '#app/drawing/plan/dimensions.tsx'
import { takenByMemberNames } from '#app/drawing/plan/members.tsx'
import { notePatch, placeNotes, placePoleNames } from '#app/drawing/plan/notes.ts'
import { stripOf } from '#app/drawing/plan/obstacle.tsx'
import { patch, patchAround, type Patch } from '#app/drawing/plan/occupied.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import { seatRadius, seatsCarryFigures } from '#app/drawing/plan/seat.tsx'
import { wallCorners } from '#app/drawing/plan/wall.tsx'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** The room that seats, tables, poles and cables take on a plan, px. */
export function takenBySite(site: Site, view: PlanView, pen: Pen, withFigure: boolean): Patch[] {
  const tables = site.tables.map((table) =>
    patch(...toScreen(view, table.centre), table.size[0] * view.scale, table.size[1] * view.scale, -table.turnDeg),
  )
  return [...takenBySmallThings(site, view, pen, withFigure), ...tables]
}

/** The same without the tables, over which a figure may stand where there is no other room. */
export function takenBySmallThings(site: Site, view: PlanView, pen: Pen, withFigure: boolean): Patch[] {
  const disc = 2 * (seatRadius(view, pen, withFigure) + 3 * pen.k)
  const seats = site.seats.map((seat) => patch(...toScreen(view, [seat.x, seat.y]), disc, disc))
  const poles = site.poles.map((pole) => patch(...toScreen(view, pole.at), 8 * pen.k, 8 * pen.k))
  const cables = site.obstacles
    .filter(({ kind }) => kind === 'cable')
    .flatMap((obstacle) => {
      const strip = stripOf(obstacle)
      if (!strip) return []
      const [x, y] = toScreen(view, [(strip.from[0] + strip.to[0]) / 2, (strip.from[1] + strip.to[1]) / 2])
      const [across, deep] = [strip.to[0] - strip.from[0], strip.to[1] - strip.from[1]]
      return [patch(x, y, Math.abs(across) * view.scale + 4, Math.abs(deep) * view.scale + 4)]
    })
  return [...seats, ...poles, ...cables]
}

/** The room that everything said on a plan of the site without heaters takes, px: names, figures and dimension lines. */
export function takenByWords(site: Site, view: PlanView, pen: Pen): Patch[] {
  const things = [
    ...takenBySite(site, view, pen, seatsCarryFigures(site.seats, view, pen)),
    ...takenByOverall(site, view, pen),
  ]
  const notes = placeNotes(site, view, pen, things).map((note) => notePatch(note, pen))
  const members = takenByMemberNames(site.members, view, pen, [])
  const poles = placePoleNames(site, view, pen, [...things, ...notes, ...members]).map((note) => notePatch(note, pen))
  const walls = site.walls.map((wall) => patchAround(wallCorners(wall, view)))
  return [
    ...things,
    ...notes,
    ...poles,
    ...walls,
    ...members,
    ...site.floor.map((from, i) => lineRoom(toScreen(view, from), toScreen(view, site.floor[i + 1] ?? site.floor[0] ?? from))), // prettier-ignore
  ]
}

/** The room that a line takes, with a little beside it. */
const lineRoom = ([ax, ay]: Vec2, [bx, by]: Vec2): Patch =>
  patch((ax + bx) / 2, (ay + by) / 2, Math.hypot(bx - ax, by - ay), 3, (Math.atan2(by - ay, bx - ax) * 180) / Math.PI)

/** The room that heaters and their names take on a plan, px. */
export function takenByHeaters(
  layout: Layout,
  models: ReadonlyMap<string, HeaterModel>,
  view: PlanView,
  pen: Pen,
): Patch[] {
  return layout.heaters.flatMap((heater) => {
    const place = heaterPlace(heater, models.get(heater.model) ?? null, view, pen)
    const width = textWidth(heater.id, pen.text, 600)
    const chevron = place.length / 2 + 8 * pen.k
    return [
      heaterPatch(place),
      patch(...heaterNameAt(place, width, pen), width, pen.text),
      ...(heater.tiltDeg === 0
        ? []
        : [patch(place.x - place.nameEnd[0] * chevron, place.y - place.nameEnd[1] * chevron, 14 * pen.k, 12 * pen.k)]),
    ]
  })
}
