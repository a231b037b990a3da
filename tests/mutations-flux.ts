import type { Mutation } from '#tests/mutations-comfort.ts'

const radiometry = 'tests/published/radiometry.test.ts'
const factors = 'tests/published/configuration-factors.test.ts'
const thumb = 'tests/published/rules-of-thumb.test.ts'
const seats = 'tests/published/reference-seats.test.ts'
const irradiance = 'tests/domain/flux/irradiance.test.ts'
const beam = 'tests/domain/flux/beam.test.ts'
const largest = 'tests/domain/flux/largest-irradiance.test.ts'
const map = 'tests/domain/flux/map.test.ts'
const grid = 'tests/domain/flux/grid.test.ts'
const shading = 'tests/domain/flux/shading.test.ts'
const contours = 'tests/drawing/contours.test.ts'
const nodes = 'tests/domain/flux/nodes.test.ts'
const cutOff = 'tests/domain/flux/cut-off.test.ts'
const points = 'tests/domain/flux/many-points.test.ts'
const power = 'tests/domain/heaters/power.test.ts'
const picture = 'tests/drawing/heat/map-picture.test.ts'

const within = (file: string, test: string, ...changes: [from: string, to: string][]): Mutation[] =>
  changes.map(([from, to]) => ({ file: `app/${file}`, from, to, test }))

/** Mutations of the flux engine: a sign, an exponent or a factor each. */
export const fluxMutations: readonly Mutation[] = [
  ...within(
    'domain/flux/cosine-integral.ts',
    radiometry,
    ['logGamma((p + 1) / 2)', 'logGamma((p + 2) / 2)'],
    ['Math.sqrt(Math.PI) * Math.exp', 'Math.PI * Math.exp'],
  ),
  ...within(
    'domain/flux/cosine-integral.ts',
    beam,
    ['(k - 0.5) / k', '(k + 0.5) / k'],
    ['(up * t * far * c) / 2', '(up * t * down * c) / 2'],
    ['Math.sin(i * step) ** (p + 1)', 'Math.sin(i * step) ** p'],
  ),
  ...within(
    'domain/flux/beam.ts',
    radiometry,
    ['wholeCosineIntegral(beam.along + 1)', 'wholeCosineIntegral(beam.along)'],
    ['Math.cos(radians(fullAngleDeg / 2))', 'Math.cos(radians(fullAngleDeg))'],
    ['0.5 ** (1 / exponent)', '0.5 ** exponent'],
  ),
  ...within(
    'domain/flux/beam.ts',
    beam,
    ['- Math.sin(from) - slope', '- Math.sin(from) + slope'],
    ['angle: -angle, index', 'angle, index'],
    ['Math.abs(angle) <= 90', 'Math.abs(angle) <= 80'],
  ),
  ...within(
    'domain/flux/lengthwise.ts',
    radiometry,
    ['sine: (power1 - power2) / p', 'sine: (power1 - power2) / b'],
    ['if (z1 >= 0) return { integral: beyond1 - beyond2', 'if (z1 >= 0) return { integral: beyond2 - beyond1'],
    ['cosine1 ** p', 'cosine1 ** (p - 1)'],
  ),
  ...within(
    'domain/flux/table-stretch.ts',
    irradiance,
    ['slope * (Math.sin(to) - Math.sin(from))', 'slope * (Math.cos(to) - Math.sin(from))'],
    ['a.cosine * (1 - place.share) + b.cosine * place.share', 'a.cosine * place.share + b.cosine * (1 - place.share)'],
  ),
  ...within(
    'domain/flux/element-view.ts',
    irradiance,
    ['towards: -(nv', 'towards: (nv'],
    ['(view.alongBeam / view.h) ** beam.across\n  const', '(view.alongBeam / view.h) ** beam.along\n  const'],
    [
      'Math.atan2(view.acrossBeam, view.alongBeam)\n    const { cosine',
      'Math.atan2(-view.acrossBeam, view.alongBeam)\n    const { cosine',
    ],
  ),
  ...within('domain/flux/element-view.ts', factors, ['* length * h)', '* length * h * h)']),
  ...within(
    'domain/flux/irradiance.ts',
    irradiance,
    ['towards * cosine - along * sine', 'towards * cosine + along * sine'],
    ['along > 0 ? Math.min(z2, horizon) : z2', 'along > 0 ? z2 : z2'],
    ['view.alongElement - from)) / 4', 'view.alongElement - from)) / 2'],
  ),
  ...within(
    'domain/flux/irradiance.ts',
    largest,
    ['const along = -transmittance * sine', 'const along = transmittance * sine'],
    ['of planeStarts(vectors)', 'of [whole]'],
  ),
  ...within('domain/flux/plane-starts.ts', largest, ['offerSumsByPairs(strong, longest)', '']),
  ...within('domain/flux/emitter.ts', seats, ['radiantPower: radiantPower / centres.length', 'radiantPower']),
  ...within('domain/layout/body.ts', seats, [
    'body.half.w - model.elementAboveLowest',
    'body.half.w + model.elementAboveLowest',
  ]),
  ...within('domain/flux/emitter.ts', thumb, ['scale(frame.v, offset)', 'scale(frame.u, offset)']),
  ...within(
    'domain/heaters/power.ts',
    power,
    ['heater.supplyVoltage / option.voltage', 'option.voltage / heater.supplyVoltage'],
    ['Math.sqrt(3)', '3'],
    ['(stage ?? model.stages.length) - 1', 'stage ?? model.stages.length'],
  ),
  ...within(
    'domain/flux/kernel.ts',
    map,
    ['if (!(height > 0)) return', ''],
    ['wy * ux - wx * uy', 'wy * ux + wx * uy'],
    ['(strength * f) / (h * h)', '(strength * f) / h'],
    ['(x - x0 - 0.5 * cell) * uy', '(x0 + 0.5 * cell - x) * uy'],
    ['const low = (start + (0.5', 'const low = (start - (0.5'],
    ['const low = (place + (0.5', 'const low = (place - (0.5'],
  ),
  ...within(
    'domain/flux/kernel.ts',
    shading,
    ['const high = (0.5 - (figures[k + 3]', 'const high = (0.5 - (figures[k + 4]'],
    ['(factor[i] ?? 0) * share', '(factor[i] ?? 0)'],
    ['radiantPower: element.radiantPower * part', 'radiantPower: element.radiantPower'],
    ['((from + to) / 2 - 0.5) * element.length', '(0.5 - (from + to) / 2) * element.length'],
  ),
  ...within('domain/flux/table-kernel.ts', map, ['side * w[2] + height * lean', 'side * w[2] - height * lean']),
  ...within('domain/flux/table-kernel.ts', shading, ['(0.5 - to) * length', '(0.5 - from) * length']),
  ...within('domain/flux/map.ts', map, [
    'addLayer(total, grid.columns, layer, -1)',
    'addLayer(total, grid.columns, layer, 1)',
  ]),
  ...within('domain/flux/grid.ts', grid, ['y1 <= y !== y2 <= y', 'y1 <= y && y2 > y']),
  ...within(
    'domain/flux/shadow.ts',
    shading,
    ['const under = linear * linear - square * constant', 'const under = linear * linear + square * constant'],
    ['offset - dotOf(normal, point)', 'offset + dotOf(normal, point)'],
    ['Math.max(from, -half)', '-half'],
  ),
  ...within('domain/flux/shading.ts', shading, ['share * shadow.transmittance, 1', 'share + shadow.transmittance, 0']),
  ...within(
    'domain/flux/silhouette.ts',
    shading,
    ['caster.radius * k]', 'caster.radius]'],
    ['const ka = gap / (sz - a[2])', 'const ka = gap / (sz + a[2])'],
    ['const headroom = 0.01', 'const headroom = 0.15'],
    ['const thinnest = 1e-9', 'const thinnest = 0'],
  ),
  ...within(
    'domain/flux/shaded-cells.ts',
    shading,
    ['opaque |= mask', 'opaque &= mask'],
    ['[6, 3, 2]', '[6, 2, 1]'],
    ['(k + i / elements) / pieces', 'k / pieces'],
    ['obstruction.heaterId !== emitter.id', 'obstruction.heaterId !== obstruction.id'],
    ['i < actives && active[i]?.thing === hider.thing', 'i < 0'],
    ['first = Math.max(first, column)', 'first = column'],
    ['before ^ mask', 'before | mask'],
  ),
  ...within(
    'domain/flux/shade-marks.ts',
    shading,
    ['(own[end] ?? 1)) / 2 - 0.5', '(own[end] ?? 1)) / 2'],
    ['(top - z) / (height - top)', '(top - z) / height'],
    ['Math.max(longest, widthOf(elements))', 'longest'],
    ['scale(add(first, last), 0.5)', 'scale(add(first, first), 0.5)'],
    ['(1 << end) - (1 << first)', '(1 << end) - 1'],
    ['const caster = casterOf(solid, cells.z, centre[2])', 'const caster = casterOf(solid, cells.z, centre[2] - 0.1)'],
  ),
  ...within(
    'domain/flux/shade-patterns.ts',
    shading,
    ['1 - (1 - share) * transmittance', '1 - share * transmittance'],
    ['const share = 1 - (hidden[from] ?? 0)', 'const share = 1 + (hidden[from] ?? 0)'],
  ),
  ...within(
    'drawing/heat/traced-field.ts',
    contours,
    ['middle - (start + end) / 2', 'middle - (start + end)'],
    ['grid.cell / 2 - (pad + 0.5) * step', 'grid.cell / 2 - pad * step'],
    ['2 * near - far', 'near + far'],
  ),
  ...within('domain/flux/nodes.ts', nodes, ['const eta = 2 * heightByLength', 'const eta = 4 * heightByLength']),
  ...within(
    'domain/flux/cut-off.ts',
    cutOff,
    ['y + r * (along * uy + left * ux)', 'y + r * (along * uy - left * ux)'],
    ['b[1] > a[1] ? x + side : x', 'b[1] > a[1] ? x : x + side'],
    ['leftOf(a, b, point[0], point[1]) > 0', 'leftOf(a, b, point[0], point[1]) < 0'],
  ),
  ...within('domain/flux/many-points.ts', points, [
    '(side * lean + height * down) * inverse',
    '(side * lean - height * down) * inverse',
  ]),
  ...within('domain/flux/directed-map.ts', picture, ['read(weights, -dz / r, last)', 'read(weights, dz / r, last)']),
  ...within(
    'domain/flux/directed-map.ts',
    shading,
    ['((from + to) / 2 - 0.5) * element.length', '(0.5 - (from + to) / 2) * element.length'],
    ['share * part', 'share'],
    ['strength * through * sum', 'strength * sum'],
  ),
  ...within('drawing/heat/map-picture.ts', picture, [
    'layerValue(grid, layer, at) >= threshold',
    'layerValue(grid, layer, at) > 2 * threshold',
  ]),
]
