import { describe, expect, it } from 'vitest'
import { BUILT_IN_BLANKS, builtInBlank } from '#shared/blank/built-in-blanks'
import { prepareBlank } from '#shared/blank/prepared-blank'
import { placeOnSurface } from '#shared/blank/surface-coordinates'
import { fitView, viewSamples } from '#shared/blank/view-samples'
import { zoneAreas } from '#shared/blank/zone-areas'
import { FAR_MM, fillZoneDistances, finZone, gillEdge, zoneDistance } from '#shared/blank/zones'

const blank = prepareBlank(builtInBlank('glide-160'))

describe('zones', () => {
  it('measure in millimetres over the skin', () => {
    const [a, b] = [placeOnSurface(blank, 0.5, 0.3, 1), placeOnSurface(blank, 0.5, 0.302, 1)]
    const walked = Math.hypot(...a.position.map((value, i) => value - (b.position[i] ?? 0)))
    const counted = zoneDistance(blank, 'belly', 0.5, 0.302) - zoneDistance(blank, 'belly', 0.5, 0.3)
    // Shares are of each half of the girth, distances of the whole: the egg keeps them a little apart.
    expect(Math.abs(counted / walked - 1)).toBeLessThan(0.05)
  })
  it('part the girth between back, flanks and belly', () => {
    for (const v of [0.05, 0.3, 0.6, 0.9]) {
      const inside = (['back', 'upper-flank', 'lower-flank', 'belly'] as const).filter(zone => zoneDistance(blank, zone, 0.5, v) > 0)
      expect(inside).toHaveLength(1)
    }
  })
  it('end the head where the trunk begins', () => {
    for (const v of [0, 0.2, 0.5, 0.8, 1]) {
      const u = gillEdge(blank.shape.gill, v)
      expect(zoneDistance(blank, 'head', u, v)).toBeCloseTo(0, 9)
      expect(zoneDistance(blank, 'trunk', u + 0.01, v)).toBeCloseTo(1.6, 6)
    }
  })
  it('keep the gill cover within the head', () => {
    const { gill } = blank.shape
    for (let v = 0.02; v < 1; v += 0.04) {
      for (let u = 0.01; u < 0.4; u += 0.01) {
        if (zoneDistance(blank, 'gill-cover', u, v) > 0) expect(zoneDistance(blank, 'head', u, v)).toBeGreaterThan(0)
      }
    }
    expect(zoneDistance(blank, 'gill-cover', gillEdge(gill, 0.5) - 0.05, 0.5)).toBeGreaterThan(0)
  })
  it('tell fins from the body in a view', () => {
    const samples = viewSamples(blank, fitView(blank, { width: 160, height: 80 }))
    const [back, dorsal] = [fillZoneDistances(blank, 'back', samples), fillZoneDistances(blank, finZone('dorsal'), samples)]
    let fins = 0
    for (let i = 0; i < samples.count; i++) {
      if (dorsal[i] === FAR_MM) {
        fins++
        expect(back[i]).toBe(-FAR_MM)
      }
    }
    expect(fins).toBeGreaterThan(20)
    expect(fillZoneDistances(blank, finZone('wing'), samples).every(d => d === -FAR_MM)).toBe(true)
  })
})

describe('the area of zones', () => {
  it.each(BUILT_IN_BLANKS.map(shape => [shape.name, shape] as const))('adds up to the body of %s', (_, shape) => {
    const one = prepareBlank(shape)
    const areas = zoneAreas(one)
    const sum = (['back', 'upper-flank', 'lower-flank', 'belly'] as const).reduce((total, zone) => total + (areas.get(zone) ?? 0), 0)
    expect(Math.abs(sum / one.measures.area - 1)).toBeLessThan(0.003)
    expect(Math.abs(((areas.get('head') ?? 0) + (areas.get('trunk') ?? 0)) / one.measures.area - 1)).toBeLessThan(0.003)
    for (const fin of shape.fins) expect(areas.get(finZone(fin.id))).toBeGreaterThan(10)
  })
})
