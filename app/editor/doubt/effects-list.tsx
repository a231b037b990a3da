import type { ReactNode } from 'react'
import { capital, checksInWords, sizeText, smallLength, sourceWords } from '#app/domain/doubt/in-words.ts'
import { largestChange } from '#app/domain/doubt/ranking.ts'
import type { Settling } from '#app/domain/doubt/settling.ts'
import type { Change, SizeEffect, SizeEffects } from '#app/domain/doubt/size-effects.ts'
import type { Dimension } from '#app/domain/site/site.ts'
import { formatQuantity, type DisplayUnits } from '#app/domain/units.ts'
import type { PlotInk } from '#app/drawing/plot/plot-ink.ts'
import { SizeBar } from '#app/drawing/plot/size-bar.tsx'

/** Colours of a plot on the page's own paper. */
export const pageInk: PlotInk = {
  ink: 'var(--color-ink)',
  quiet: 'var(--color-ink-2)',
  rule: 'var(--color-rule)',
  paper: 'var(--color-paper)',
  ember: 'var(--color-ember)',
}

/** A link to the photo that a size was measured in. */
export type PhotoLink = (photo: NonNullable<Dimension['photo']>) => ReactNode

const figures = ['coldest', 'head', 'margin'] as const
const headings = { coldest: 'Coldest seat', head: 'Hottest head', margin: 'Tightest margin' }

interface EffectsListProps {
  readonly found: SizeEffects
  /** In the order in which they are shown. */
  readonly ranked: readonly SizeEffect[]
  readonly settled: readonly Settling[]
  readonly units: DisplayUnits
  readonly photoLink: PhotoLink
}

/** Each doubtful size with what it changes: a bar for each figure, at one scale down the column. */
export function EffectsList({ found, ranked, settled, units, photoLink }: EffectsListProps) {
  const most = (figure: (typeof figures)[number]) => Math.max(...ranked.map((effect) => largestChange(effect[figure])))
  const scales = { coldest: most('coldest'), head: most('head'), margin: most('margin') }
  const [telling, idle] = [ranked.filter(tells), ranked.filter((effect) => !tells(effect))]
  const grid = 'grid grid-cols-3 gap-x-4 desk:grid-cols-[minmax(0,1fr)_8.5rem_8.5rem_8.5rem]'
  return (
    <>
      <div aria-hidden="true" className={`${grid} pb-1.5 text-2xs text-ink-3 max-desk:hidden`}>
        <span>Size, now, from</span>
        {figures.map((figure) => (
          <span key={figure}>{headings[figure]}</span>
        ))}
      </div>
      <ol>
        {telling.map((effect) => (
          <li key={effect.size.key} className={`${grid} border-t border-rule py-2`}>
            <div className="col-span-3 min-w-0 pb-1 desk:col-span-1 desk:pb-0">
              <SizeHead effect={effect} {...{ units, photoLink }} />
              <WhatItChanges effect={effect} found={found} settled={settled} />
            </div>
            {figures.map((figure) => (
              <div key={figure} className="min-w-0">
                <p className="text-2xs text-ink-3 desk:sr-only">{headings[figure]}</p>
                <Bar change={effect[figure]} most={scales[figure]} inMetres={figure === 'margin'} {...{ units }} />
              </div>
            ))}
          </li>
        ))}
      </ol>
      {idle.length > 0 && (
        <p className="border-t border-rule py-2 text-ink-2">
          <span className="font-medium text-ink">Change nothing here: </span>
          {idle.map(({ size }) => `${size.label} (${sizeText(size, units)}, ${sourceWords(size)})`).join(', ')}.
        </p>
      )}
    </>
  )
}

/** Whether a size changes any figure or check. */
const tells = ({ coldest, head, margin, turns, shares }: SizeEffect): boolean =>
  largestChange(coldest) > 1e-3 || largestChange(head) > 1e-3 || largestChange(margin) > 1e-5 || turns.length > 0 || Object.values(shares).some((share) => share > 1e-6) // prettier-ignore

function SizeHead({
  effect: { size },
  units,
  photoLink,
}: Pick<EffectsListProps, 'units' | 'photoLink'> & { effect: SizeEffect }) {
  // prettier-ignore
  const several = size.kind === 'unstated' ? `${size.sizes} ${size.sizes === 1 ? 'size' : 'sizes'} not stated, ` : ''
  const source = size.kind === 'unstated' ? '' : `, ${sourceWords(size)}`
  return (
    <p>
      <span className="font-medium">{capital(size.label)}</span>
      <span className="ml-2 text-ink-2">
        {several}
        {sizeText(size, units)}
        {source}
      </span>
      {size.photo && <span className="ml-2">{photoLink(size.photo)}</span>}
    </p>
  )
}

function WhatItChanges({
  effect,
  found,
  settled,
}: Pick<EffectsListProps, 'found' | 'settled'> & { effect: SizeEffect }) {
  // prettier-ignore
  const { key } = effect.size
  const settles = settled.filter(({ alone, together }) => alone.includes(key) || together.includes(key))
  const turned = effect.turns.flatMap((check) => found.nominal.checks.get(check) ?? [])
  if (settles.length + turned.length === 0) return null
  return (
    <p className="text-xs text-ink-2">
      {settles.length > 0 && `Measured, it would ${settles.every(({ alone }) => alone.includes(key)) ? '' : 'help to '}settle ${checksInWords(settles.map(({ finding }) => finding))}. `}
      {turned.length > 0 && `Turns within its tolerance: ${checksInWords(turned)}.`}
    </p>
  ) // prettier-ignore
}

function Bar({
  change,
  most,
  inMetres,
  units,
}: {
  change: Change
  most: number
  inMetres: boolean
  units: DisplayUnits
}) {
  // prettier-ignore
  const text = (by: number | null) => changeText(by, inMetres, units)
  if (change.lower === null && change.higher === null) return <p className="text-ink-3">–</p>
  const largest = largestChange(change)
  if (largest < leastShown(inMetres))
    return <p className="text-xs text-ink-3">{largest < 1e-3 * leastShown(inMetres) ? 'none' : 'hardly any'}</p>
  const [less, more] = [text(change.lower), text(change.higher)]
  return (
    <>
      <SizeBar change={change} most={most} width={96} ink={pageInk} label={`Less: ${less}. More: ${more}.`} />
      <p className="flex flex-wrap gap-x-2 text-2xs text-ink-2">
        <span>less {less}</span>
        <span>more {more}</span>
      </p>
    </>
  )
}

/** Changes that are written as figures, W/m² or m. */
const leastShown = (inMetres: boolean): number => (inMetres ? 5e-4 : 0.54)

/** "−12 W/m²", "+60 mm", "0". */
function changeText(by: number | null, inMetres: boolean, units: DisplayUnits): string {
  if (by === null) return '–'
  if (Math.abs(by) < leastShown(inMetres)) return '0'
  const size = Math.abs(by)
  const text = inMetres ? smallLength(size, units) : formatQuantity(size, 'irradiance', units)
  return `${by < 0 ? '−' : '+'}${text}`
}
