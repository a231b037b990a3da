import { useId } from 'react'
import { capital, checkWords, smallLength, subjectWords } from '#app/domain/doubt/in-words.ts'
import { largestError } from '#app/domain/doubt/turning-points.ts'
import type { WrongFigures } from '#app/domain/doubt/wrong-sizes.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { formatQuantity, type DisplayUnits } from '#app/domain/units.ts'
import { inputClass } from '#app/components/field.tsx'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'

interface ErrorProps {
  /** As a share; positive: in truth everything is longer. */
  readonly error: number
  readonly onError: (error: number) => void
}

const most = largestError * 100
const percentOf = (error: number) => Math.round(error * 1000) / 10

/** A slider from −15 to +15 %, its ends under those of the strip above it. */
export function ErrorSlider({ error, onError }: ErrorProps) {
  const percent = percentOf(error)
  return (
    <input
      type="range"
      aria-label="Error of the sizes, percent"
      aria-valuetext={`${percent} percent`}
      min={-most}
      max={most}
      step={0.5}
      value={percent}
      onChange={(event) => onError(Number(event.target.value) / 100)}
      className="mx-3 block h-8 w-[calc(100%-24px)] cursor-pointer accent-ember pointer-coarse:h-11"
    />
  )
}

/** The same error as a figure to type; one beyond ±15 % is taken as that. */
export function ErrorField({ error, onError }: ErrorProps) {
  const id = useId()
  const percent = percentOf(error)
  const take = (text: string) => {
    const typed = Number(text.replace(',', '.').replace('−', '-'))
    if (text.trim() !== '' && Number.isFinite(typed)) onError(Math.max(-most, Math.min(most, typed)) / 100)
  }
  return (
    <span className="inline-flex items-center gap-2">
      <label htmlFor={id} className="text-ink-2">
        −15 to 15
      </label>
      <span className="flex h-8 w-20 flex-none items-center gap-1 rounded-md border border-rule-strong bg-paper-raised pr-2 has-[:focus-visible]:outline-2 has-[:focus-visible]:outline-offset-1 has-[:focus-visible]:outline-focus pointer-coarse:h-11">
        <input
          id={id}
          key={percent}
          type="text"
          inputMode="decimal"
          autoComplete="off"
          aria-label="Error of the sizes, −15 to 15 %"
          defaultValue={`${percent}`.replace('-', '−')}
          onBlur={(event) => take(event.target.value)}
          onKeyDown={(event) => event.key === 'Enter' && take(event.currentTarget.value)}
          className={inputClass}
        />
        <span aria-hidden="true" className="text-xs text-ink-3">
          %
        </span>
      </span>
    </span>
  )
}

/** The figures at an error: coldest seat, hottest head, tightest margin, and the checks that have turned. */
export function AtError({ wrong, units }: { wrong: WrongFigures; units: DisplayUnits }) {
  const { coldest, head, tightest, tightestFinding, turned } = wrong
  const flux = (irradiance: number) => formatQuantity(irradiance, 'irradiance', units)
  const rows = [
    ['Coldest seat', coldest && flux(coldest.irradiance), coldest && `${coldest.seatId}, ${coldest.target}`],
    ['Hottest head', head && flux(head.irradiance), head && head.seatId],
    ['Tightest margin', tightest && signedLength(tightest.margin, units), tightestFinding && checkAt(tightestFinding)],
  ] as const
  return (
    <>
      <dl className="flex flex-wrap gap-x-8 gap-y-2">
        {rows.map(([name, figure, at]) => (
          <div key={name}>
            <dt className="text-2xs text-ink-3">{name}</dt>
            <dd className="text-lg font-medium">
              {figure ?? '–'}
              {at && <span className="ml-2 text-xs font-regular text-ink-2">{at}</span>}
            </dd>
          </div>
        ))}
      </dl>
      <p className="mt-2 text-ink-2">
        {turned.length === 0
          ? 'No check comes out otherwise.'
          : `${turned.length} ${turned.length === 1 ? 'check comes' : 'checks come'} out otherwise:`}
      </p>
      {turned.length > 0 && (
        <ul className="relative max-h-64 overflow-y-auto" tabIndex={0} aria-label="Checks that come out otherwise">
          {turned.map(({ check, finding, from, to }) => (
            <li key={check} className="flex items-center gap-2 border-t border-rule py-1">
              <OutcomeMark outcome={to} />
              <span className="min-w-0 flex-1">{checkAt(finding)}</span>
              <span className="text-xs whitespace-nowrap text-ink-2">{`${from} → ${to}`}</span>
            </li>
          ))}
        </ul>
      )}
    </>
  )
}

/** "Clearance above, H2". */
export function checkAt(finding: Finding): string {
  const [words, subject] = [checkWords(finding), subjectWords(finding)]
  const condition = finding.condition ? `, when ${finding.condition}` : ''
  return `${capital(words)}${subject ? `, ${subject}` : ''}${condition}`
}

const signedLength = (metres: number, units: DisplayUnits): string =>
  `${metres < 0 ? '−' : ''}${smallLength(Math.abs(metres), units)}`
