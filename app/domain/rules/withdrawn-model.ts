import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { findingOf, type Rule } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** The model is in the catalogue and may still be placed. A model that the catalogue has not cannot be told. */
export function withdrawnModel(heater: MountedHeater, model: HeaterModel | undefined): Finding {
  const rule: Rule = {
    rule: 'withdrawn-model',
    weight: 'hard stop',
    subject: { kind: 'heater', id: heater.id },
    source: 'Catalogue',
    unit: 'none',
  }
  if (!model) {
    return findingOf(rule, 'cannot tell', {
      title: `No model ${heater.model} in the catalogue`,
      remedy: 'Choose a model of the catalogue.',
    })
  }
  return model.status === 'withdrawn'
    ? findingOf(rule, 'fails', { title: `${model.name} is withdrawn`, remedy: model.note ?? 'Choose a current model.' })
    : findingOf(rule, 'pass', { title: `${model.name} is current` })
}
