import type { FiguresQuestion } from '#app/domain/comparison/layout-figures.ts'
import { unmoved } from '#app/domain/doubt/doubtful-size.ts'
import { outcomeIn, turnedChecks, weigh, type Figures } from '#app/domain/doubt/weighed.ts'
import type { Finding, Outcome } from '#app/domain/rules/finding.ts'
import { moveDimension } from '#app/domain/site/dimension.ts'
import type { Site, SizeSource } from '#app/domain/site/site.ts'

/** The site with every dimension of these sources longer by the share `error` of its value. */
export function scaleSizes(site: Site, sources: readonly SizeSource[], error: number): Site {
  return site.dimensions
    .filter(({ source }) => sources.includes(source))
    .reduce((moved, dimension) => moveDimension(moved, dimension, dimension.value * error), site)
}

/** A layout's figures and checks when sizes are wrong by a share. */
export type FiguresAt = (error: number) => Figures

/** The figures of a layout with every dimension of these sources wrong by one share; each error is reckoned once. */
export function figuresAtErrors(question: FiguresQuestion, sources: readonly SizeSource[]): FiguresAt {
  const known = new Map<number, Figures>()
  return (error) => {
    const found = known.get(error)
    if (found) return found
    const site = error === 0 ? question.site : scaleSizes(question.site, sources, error)
    const { coldest, head, tightest, checks } = weigh(unmoved({ ...question, site }))
    const figures = { coldest, head, tightest, checks }
    known.set(error, figures)
    return figures
  }
}

/** A check that comes out otherwise; its finding there, or as the sizes are written where it is not listed there. */
interface TurnedCheck {
  readonly check: string
  readonly from: Outcome
  readonly to: Outcome
  readonly finding: Finding
}

/** What a layout comes to with sizes that are wrong by one share. */
export interface WrongFigures extends Pick<Figures, 'coldest' | 'head' | 'tightest'> {
  readonly error: number
  readonly tightestFinding: Finding | null
  readonly turned: readonly TurnedCheck[]
}

/** The figures at an error and the checks that turned. */
export function wrongFigures(figuresAt: FiguresAt, error: number): WrongFigures {
  const [nominal, there] = [figuresAt(0), figuresAt(error)]
  const { coldest, head, tightest } = there
  const turned = turnedChecks(nominal, there).flatMap((check): TurnedCheck[] => {
    const finding = there.checks.get(check) ?? nominal.checks.get(check)
    return finding ? [{ check, from: outcomeIn(nominal, check), to: outcomeIn(there, check), finding }] : []
  })
  return { error, coldest, head, tightest, tightestFinding: there.checks.get(tightest?.check ?? '') ?? null, turned }
}
