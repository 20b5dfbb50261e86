import type { Station } from '#shared/blank/blank-shape'
import type { Profile, Section } from '#shared/blank/profile'

/** A body whose sections are known exactly: x from 0 to `length`, half height and half width as functions of t. */
export function exactBody(length: number, knots: number[], half: (t: number) => Pick<Section, 'h' | 'w' | 'ht' | 'wt'>, n = 2, egg = 0): Profile {
  return {
    length,
    knots,
    section(t, out) {
      const { h, w, ht, wt } = half(t)
      Object.assign(out, {
        t, h, w, ht, wt, n, nt: 0, c: 0, ct: 0, g: egg * h, gt: egg * ht,
        x: length * (1 - Math.cos(Math.PI * t)) / 2,
        xt: length * Math.PI * Math.sin(Math.PI * t) / 2,
      })
    },
  }
}

export function exactEllipsoid(length: number, height: number, width: number, knots: number[]): Profile {
  return exactBody(length, knots, t => ({
    h: height / 2 * Math.sin(Math.PI * t),
    w: width / 2 * Math.sin(Math.PI * t),
    ht: height / 2 * Math.PI * Math.cos(Math.PI * t),
    wt: width / 2 * Math.PI * Math.cos(Math.PI * t),
  }))
}

/** Places even in t, as shares of the length. */
export function evenShares(count: number): number[] {
  return Array.from({ length: count }, (_, i) => i === count - 1 ? 1 : (1 - Math.cos(Math.PI * i / (count - 1))) / 2)
}

/** Stations of an ellipsoid of revolution or not, at the given shares of its length. */
export function ellipsoidStations(height: number, width: number, shares: number[]): Station[] {
  return shares.map((s) => {
    const r = s === 0 || s === 1 ? 0 : Math.sqrt(1 - (1 - 2 * s) ** 2)
    return { s, top: height / 2 * r, bottom: -height / 2 * r, halfWidth: width / 2 * r, exponent: 2, egg: 0 }
  })
}

export function evenKnots(gaps: number): number[] {
  return Array.from({ length: gaps + 1 }, (_, i) => i / gaps)
}
