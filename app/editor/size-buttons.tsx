import { Button, IconButton } from '#app/components/button.tsx'
import type { PlanViewing } from '#app/editor/use-plan-view.ts'

/** Ways to change the size without a wheel: over the plan’s lower left corner; on small screens one above the other in its left margin. */
export function SizeButtons({ viewing }: { viewing: PlanViewing }) {
  return (
    <div
      role="group"
      aria-label="Size of the plan"
      className="absolute bottom-2 left-2 flex items-center rounded-md border border-rule bg-paper-raised/90 max-desk:top-2 max-desk:bottom-auto max-desk:left-1 max-desk:flex-col print:hidden"
    >
      <IconButton icon="fit" label="Whole plan" onClick={viewing.showAll} />
      <IconButton icon="minus" label="Smaller" onClick={() => viewing.enlargeAt(0.8)} />
      <IconButton icon="plus" label="Larger" onClick={() => viewing.enlargeAt(1.25)} />
      <Button
        kind="text"
        size="small"
        title="1 : 50 on the screen"
        onClick={viewing.showTrueSize}
        className="max-desk:hidden"
      >
        100 %
      </Button>
    </div>
  )
}
