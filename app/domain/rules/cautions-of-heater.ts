import { glowsBright } from '#app/domain/heaters/glow.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { cautionKinds, type CautionKind } from '#app/domain/rules/cautions-on-plan.ts'
import type { Finding, Outcome } from '#app/domain/rules/finding.ts'

/** A caution about one heater, for the person who hangs it. */
export interface HeaterCaution {
  readonly kind: CautionKind
  /** Of the finding that it comes from; null where it comes from the model itself. */
  readonly outcome: Outcome | null
  readonly sentence: string
}

/** What else is dangerous to who installs, beside the cautions that change placement. */
const onSite: Readonly<Record<string, CautionKind>> = {
  ...cautionKinds,
  'support-load-alone': 'structure',
  'pole-wind': 'structure',
  'sprinkler-distance': 'fire',
  'glow-near-step': 'eyes',
}

/** That a heater is not held is said by itself: it is not hung at all. */
const saidElsewhere: readonly string[] = ['supported', 'mount-offered']

/** The cautions that concern one heater alone, in the order of its findings: what was found and does not pass. */
export function cautionsOfHeater(
  id: string,
  model: HeaterModel | undefined,
  findings: readonly Finding[],
): HeaterCaution[] {
  const found = findings.flatMap((finding): HeaterCaution[] => {
    const { rule, subject, outcome } = finding
    const kind = onSite[rule]
    if (!kind || subject.kind !== 'heater' || subject.id !== id || outcome === 'pass') return []
    if (saidElsewhere.includes(rule) && outcome === 'fails') return []
    return [{ kind, outcome, sentence: sentenceOf(finding) }]
  })
  const glow = 'It glows brightly: do not look into it when it is switched on.'
  return model && glowsBright(model) ? [...found, { kind: 'eyes', outcome: null, sentence: glow }] : found
}

/** The state of a movable thing, "umbrella: open", without the thing where that is named already. */
function stateIn(title: string, condition: string): string {
  const at = condition.lastIndexOf(': ')
  return at >= 0 && title.includes(condition.slice(0, at)) ? condition.slice(at + 2) : condition
}

function sentenceOf({ rule, title, outcome, condition, remedy }: Finding): string {
  const advice =
    rule === 'support-load'
      ? 'It must not carry the heater until its maker or the structure’s engineer confirms the load.'
      : remedy
  const parts = [
    `${title}${condition === null ? '' : `, while ${stateIn(title, condition)}`}.`,
    outcome === 'measure first' ? 'Measure first.' : null,
    advice,
  ]
  return parts.filter((part) => part !== null).join(' ')
}
