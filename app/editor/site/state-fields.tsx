import { changeObstacle } from '#app/domain/site/edits.ts'
import type { Obstacle } from '#app/domain/site/site.ts'
import { usualStates } from '#app/domain/site/usual-states.ts'
import { Button } from '#app/components/button.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { PickInput, TextInput } from '#app/editor/site/fact-inputs.tsx'
import { ShapeFields } from '#app/editor/site/shape-fields.tsx'

type State = NonNullable<Obstacle['states']>[number]

const mostStates = 8

/** The states of a movable thing: what it is called then, and the room it fills; away: none. */
export function StateFields({ obstacle }: { obstacle: Obstacle }) {
  const { readOnly, change } = useSiteEditing()
  const { id, shape } = obstacle
  const states = obstacle.states ?? usualStates(obstacle.kind, shape)
  const without = (at: number) =>
    change((old) => changeObstacle(old, id, { states: states.filter((_, i) => i !== at) }))
  const add = () => {
    const taken = new Set(states.map(({ name }) => name))
    let number = states.length + 1
    while (taken.has(`state ${number}`)) number++
    change((old) => changeObstacle(old, id, { states: [...states, { name: `state ${number}`, shape }] }))
  }
  return (
    <fieldset className="space-y-2 border-t border-rule pt-2">
      <legend className="sr-only">States</legend>
      <p className="flex items-center justify-between">
        <span className="font-medium">States</span>
        {!readOnly && (
          <Button
            size="small"
            kind="text"
            onClick={() => change((old) => changeObstacle(old, id, { states: usualStates(obstacle.kind, shape) }))}
          >
            The usual ones
          </Button>
        )}
      </p>
      {states.map((state, at) => (
        <OneState key={`${id} ${at}`} {...{ obstacle, states, state, at }} onRemove={() => without(at)} />
      ))}
      {!readOnly && states.length < mostStates && (
        <Button size="small" icon="plus" onClick={add}>
          Another state
        </Button>
      )}
    </fieldset>
  )
}

interface OneStateProps {
  readonly obstacle: Obstacle
  readonly states: readonly State[]
  readonly state: State
  readonly at: number
  readonly onRemove: () => void
}

const sameShape = (a: State['shape'], b: State['shape']): boolean => JSON.stringify(a) === JSON.stringify(b)

function OneState({ obstacle, states, state, at, onRemove }: OneStateProps) {
  const { readOnly } = useSiteEditing()
  const { id, shape } = obstacle
  const room = state.shape === null ? 'none' : sameShape(state.shape, shape) ? 'all' : 'own'
  const put = (next: State) => states.map((each, i) => (i === at ? next : each))
  return (
    <div className="grid grid-cols-2 items-start gap-x-3 gap-y-2 border-b border-rule pb-2 last:border-b-0 tablet:grid-cols-4 wide:grid-cols-3">
      <TextInput
        label={`State ${at + 1}`}
        value={state.name}
        edit={(old, name) => changeObstacle(old, id, { states: put({ ...state, name: name || state.name }) })}
      />
      <PickInput
        label="It fills"
        value={room}
        options={[
          { value: 'all', label: 'all of the shape' },
          { value: 'own', label: 'a room of its own' },
          { value: 'none', label: 'nothing, it is away' },
        ]}
        edit={(old, next) =>
          changeObstacle(old, id, {
            states: put({
              ...state,
              shape: next === 'none' ? null : next === 'all' ? shape : ownRoom(state.shape ?? shape),
            }),
          })
        }
      />
      {!readOnly && (
        <p className="pt-4">
          <Button size="small" kind="text" icon="remove" disabled={states.length === 1} onClick={onRemove}>
            State {at + 1}
          </Button>
        </p>
      )}
      {room === 'own' && state.shape && (
        <ShapeFields
          of={`${state.name}: `}
          shape={state.shape}
          edit={(old, next) => changeObstacle(old, id, { states: put({ ...state, shape: next }) })}
        />
      )}
    </div>
  )
}

/** A room to start from that differs from the whole: its upper half. */
const ownRoom = (shape: NonNullable<State['shape']>): NonNullable<State['shape']> => ({
  ...shape,
  z: [Math.round(((shape.z[0] + shape.z[1]) / 2) * 100) / 100, shape.z[1]],
})
