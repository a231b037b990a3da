import type { Cover, Level, Member, Obstacle, Pole, Seat, Shape, Table, Wall } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** A step in plan, m. */
export interface Step {
  readonly dx: number
  readonly dy: number
}

const moved = ([x, y]: Vec2, { dx, dy }: Step): [number, number] => [roundLength(x + dx), roundLength(y + dy)]

const range = ([low, high]: Vec2, by: number): [number, number] => [roundLength(low + by), roundLength(high + by)]

/** A shape moved in plan. */
function movedShape(shape: Shape, step: Step): Shape {
  switch (shape.kind) {
    case 'box':
      return { ...shape, x: range(shape.x, step.dx), y: range(shape.y, step.dy) }
    case 'cylinder':
      return { ...shape, centre: moved(shape.centre, step) }
    case 'prism':
      return { ...shape, outline: shape.outline.map((corner) => moved(corner, step)) }
  }
}

/** An obstacle moved in plan with all its states. */
export const movedObstacle = (obstacle: Obstacle, step: Step): Obstacle => ({
  ...obstacle,
  shape: movedShape(obstacle.shape, step),
  ...(obstacle.states && {
    states: obstacle.states.map((state) => ({ ...state, shape: state.shape && movedShape(state.shape, step) })),
  }),
})

/** A cover moved in plan; its heights stay. */
export const movedCover = (cover: Cover, step: Step): Cover => ({
  ...cover,
  corners: cover.corners.map(([x, y, height]): [number, number, number] => [...moved([x, y], step), height]),
})

/** A member moved in plan; an underside that follows a cover follows it at the new place. */
export const movedMember = (member: Member, step: Step): Member => ({
  ...member,
  from: moved(member.from, step),
  to: moved(member.to, step),
})

export const movedWall = (wall: Wall, step: Step): Wall => ({
  ...wall,
  from: moved(wall.from, step),
  to: moved(wall.to, step),
})

export const movedPole = (pole: Pole, step: Step): Pole => ({ ...pole, at: moved(pole.at, step) })

export const movedTable = (table: Table, step: Step): Table => ({ ...table, centre: moved(table.centre, step) })

export const movedLevel = (level: Level, step: Step): Level => ({
  ...level,
  outline: level.outline.map((corner) => moved(corner, step)),
})

export const movedSeat = (seat: Seat, { dx, dy }: Step): Seat => ({
  ...seat,
  x: roundLength(seat.x + dx),
  y: roundLength(seat.y + dy),
})
