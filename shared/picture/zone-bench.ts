import { prepareBlank } from '#shared/blank/prepared-blank'
import type { ZoneName } from '#shared/blank/zone-names'
import { fitView, viewSamples } from '#shared/blank/view-samples'
import { canonicalJson } from '#shared/scheme/canonical'
import { depositKeep, depositMap, type DepositKeep } from './deposit-map'
import { keepSome } from './keep-some'
import type { Look } from './look'
import type { ShownCoat } from './shown-coats'
import { zonePlaces, type ZonePlace } from './zone-places'

/** A flank this wide, pixels, holds hundreds of samples in each zone. */
const VIEW = { width: 240, height: 120 }
const KEPT = { blanks: 3, deposits: 240 }

/** How much of each coat lies in each zone. */
export interface ZoneBench {
  zones(look: Look): readonly ZonePlace[]
  /** What one effective pass of a coat lays in the middle of a zone's samples, in passes: under a net, what its openings let through. */
  share(look: Look, coat: ShownCoat, zone: ZoneName): number
}

interface ZoneKit { key: string, keep: DepositKeep, places: ZonePlace[] }

/** Puts up a bench that keeps what it has measured. */
export function zoneBench(): ZoneBench {
  const kits = keepSome<ZoneKit>(KEPT.blanks)
  const shares = keepSome<ReadonlyMap<ZoneName, number>>(KEPT.deposits)

  function kitOf({ materials: { blank: { shape } } }: Look): ZoneKit {
    const key = canonicalJson(shape)
    return kits(key, () => {
      const blank = prepareBlank(shape)
      const samples = viewSamples(blank, fitView(blank, VIEW))
      return { key, keep: depositKeep(samples, blank), places: zonePlaces(blank, samples) }
    })
  }

  return {
    zones: look => kitOf(look).places,
    share(look, coat, zone) {
      const { key, keep, places } = kitOf(look)
      const measured = shares(`${coat.placeKey}${key}`, () => {
        const map = depositMap(keep, coat.laid)
        return new Map(places.map(place => [place.zone, map.peak * (median(map.codes, place.samples) / 255) ** 2]))
      })
      return measured.get(zone) ?? 0
    },
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
