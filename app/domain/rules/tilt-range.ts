import { heaterRule, judgedBy, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** The tilt, to whichever side, lies within the manual's range. */
export function tiltRange(check: HeaterCheck): Finding {
  const { heater, model } = check
  const tilt = Math.abs(heater.tiltDeg)
  const range = model.tiltDeg
  const overLeast = range ? tilt - range.min : 0
  const underMost = range ? range.max - tilt : 0
  return judgedBy(
    heaterRule(check, 'tilt-range', 'hard stop', '°'),
    {
      fails: "Tilt outside the manual's range",
      'measure first': "Tilt near the end of the manual's range",
      pass: "Tilt within the manual's range",
      'cannot tell': 'The manual states no range of tilt',
    },
    {
      value: tilt,
      limit: range && (overLeast < underMost ? range.min : range.max),
      margin: range && Math.min(overLeast, underMost),
      tolerance: 0,
      remedy: range ? `Tilt it between ${range.min} and ${range.max}°.` : 'Enter the range from the manual.',
    },
  )
}
