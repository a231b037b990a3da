import type { BeamData } from '#app/domain/heaters/heater-model.ts'

/** A beam in a few words: "75° × 100°" across and along, "measured: table of 13 × 19", "no beam data". */
export function beamInWords(beam: BeamData | null): string {
  if (!beam) return 'no beam data'
  if (beam.kind === 'angles') return `${beam.acrossFullAngleDeg}° × ${beam.alongFullAngleDeg}°`
  return `measured: table of ${beam.acrossDeg.length} × ${beam.alongDeg.length}`
}
