import { expect, it } from 'vitest'
import { thinFilm } from '../../../shared/optics/thin-film'
import truth from './thin-film.json'

it('agrees with independent transfer matrices for coated mica, clear and absorbing', () => {
  let worst = 0
  for (const [wavelength, angle, n, k, oxide, mica, R, T] of truth.cases as number[][]) {
    const coat = { n: n!, k: k!, d: oxide! }
    const films = [coat, { n: 1.59, k: 0, d: mica! }, coat]
    const got = thinFilm({ wavelength: wavelength!, angle: angle!, n0: 1.5, films, nExit: 1.5 })
    worst = Math.max(worst, Math.abs(got.R - R!), Math.abs(got.T - T!))
  }
  expect(truth.cases).toHaveLength(80)
  expect(worst).toBeLessThan(1e-11)
})

const bare = { wavelength: 550, angle: 0, n0: 1, films: [], nExit: 1.5 }

// A. J. Fresnel: ((n − 1)/(n + 1))² upright, and for p light nothing at Brewster's angle
it('reflects 4 % of upright light from a bare epoxy surface', () => {
  expect(thinFilm(bare).R).toBeCloseTo(0.04, 14)
})
it('reflects half of what s light alone would at Brewster’s angle', () => {
  const angle = Math.atan(1.5) * 180 / Math.PI
  const s = ((1 - 1.5 ** 2) / (1 + 1.5 ** 2)) ** 2
  expect(thinFilm({ ...bare, angle }).R).toBeCloseTo(s / 2, 12)
})

// H. A. Macleod, "Thin-Film Optical Filters": a quarter wave gives ((n0·ns − n²)/(n0·ns + n²))²
it('peaks at a quarter wave, at the closed-form height', () => {
  const quarter = 550 / 4 / 2.5
  const film = (d: number) => thinFilm({ wavelength: 550, angle: 0, n0: 1.5, films: [{ n: 2.5, k: 0, d }], nExit: 1.5 }).R
  expect(film(quarter)).toBeCloseTo(((1.5 * 1.5 - 2.5 ** 2) / (1.5 * 1.5 + 2.5 ** 2)) ** 2, 12)
  expect(film(quarter)).toBeGreaterThan(film(quarter - 3))
  expect(film(quarter)).toBeGreaterThan(film(quarter + 3))
})
it('lets a half wave vanish', () => {
  const films = [{ n: 2.5, k: 0, d: 550 / 2 / 2.5 }]
  expect(thinFilm({ wavelength: 550, angle: 0, n0: 1.5, films, nExit: 1.5 }).R).toBeCloseTo(0, 14)
})
