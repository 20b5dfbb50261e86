import { prepareBlank } from '#shared/blank/prepared-blank'
import type { ZoneName } from '#shared/blank/zone-names'
import { fitView, viewSamples } from '#shared/blank/view-samples'
import type { QuickCoat } from '#shared/optics/quick-eye'
import type { PromiseSpread } from '#shared/optics/spread'
import { depositKeep, depositMap, type DepositKeep } from './deposit-map'
import { keepSome, type KeepSome } from './keep-some'
import type { Look } from './look'
import type { ShownCoat } from './shown-coats'
import { valueKeys } from './value-key'
import type { ZoneColour } from './zone-colours'
import { zonePlaces, type ZonePlace } from './zone-places'

/** A flank this wide, pixels, holds hundreds of samples in each zone. */
const VIEW = { width: 240, height: 120 }
/** Coats laid twelve high in a dozen zones, and what a few edits make of them. */
const KEPT = { blanks: 3, deposits: 240, coats: 600, photons: 300, zones: 120, names: 1000 }

/** How much of each coat lies in each zone, and what was worked out of it for the last looks: an edit changes little of either. */
export interface ZoneBench {
  zones(look: Look): readonly ZonePlace[]
  /** What one effective pass of a coat lays in the middle of a zone's samples, in passes: under a net, what its openings let through. */
  share(look: Look, coat: ShownCoat, zone: ZoneName): number
  /** A short name for a value that does not change: alike for alike values. */
  nameOf(value: object): number
  coats: KeepSome<QuickCoat>
  photons: KeepSome<Float64Array>
  colours: KeepSome<ZoneColour>
  spreads: KeepSome<PromiseSpread>
}

interface ZoneKit { keep: DepositKeep, places: ZonePlace[], shares: KeepSome<ReadonlyMap<ZoneName, number>> }

/** Puts up a bench that keeps what it has measured. */
export function zoneBench(): ZoneBench {
  const kits = keepSome<ZoneKit>(KEPT.blanks)
  const keyOf = valueKeys()
  const names = keepSome<number>(KEPT.names)
  let named = 0

  function kitOf({ materials: { blank: { shape } } }: Look): ZoneKit {
    return kits(keyOf(shape), () => {
      const blank = prepareBlank(shape)
      const samples = viewSamples(blank, fitView(blank, VIEW))
      return { keep: depositKeep(samples, blank), places: zonePlaces(blank, samples), shares: keepSome(KEPT.deposits) }
    })
  }

  return {
    zones: look => kitOf(look).places,
    share(look, coat, zone) {
      const { keep, places, shares } = kitOf(look)
      const measured = shares(coat.placeKey, () => {
        const map = depositMap(keep, coat.laid)
        return new Map(places.map(place => [place.zone, map.peak * (median(map.codes, place.samples) / 255) ** 2]))
      })
      return measured.get(zone) ?? 0
    },
    nameOf: value => names(keyOf(value), () => ++named),
    coats: keepSome(KEPT.coats), photons: keepSome(KEPT.photons), colours: keepSome(KEPT.zones), spreads: keepSome(KEPT.zones),
  }
}

/** Middle of the codes at some places. Codes are bytes, so they are counted, not sorted. */
function median(codes: Uint8Array, places: Uint32Array): number {
  const counts = new Uint32Array(256)
  for (const place of places) counts[codes[place]!]!++
  let passed = 0
  for (let code = 0; code < 256; code++) {
    passed += counts[code]!
    if (2 * passed >= places.length) return code
  }
  return 0
}
