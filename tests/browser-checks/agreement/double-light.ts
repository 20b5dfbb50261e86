import { overGround } from '#shared/optics/film'
import type { LightAsk } from '#shared/picture/engine/picture-engine'
import { glowLight } from '#shared/picture/glow-light'
import { BANDS } from '#shared/picture/level-table'
import { paintLight } from '#shared/picture/paint-light'

/**
 * The light of a picture's samples worked out in double precision the slow way: every coat over its ground by the formula of a
 * single film, nothing kept from before, nothing put off to the end.
 */
export function doubleLight({ groundKey: _, ground, coats, form, lighting }: LightAsk): Float32Array {
  const { count } = form.samples
  const reflectance = new Float32Array(count * BANDS)
  for (let i = 0; i < count; i++) {
    for (let b = 0; b < BANDS; b++) {
      let under = ground[b]!
      for (const { codes, table: { R, T, empty } } of coats) {
        const level = codes[i]!
        if (level > empty) under = overGround(R[level * BANDS + b]!, T[level * BANDS + b]!, under)
      }
      reflectance[i * BANDS + b] = under
    }
  }
  const glow = glowLight(coats, ground, count, lighting.seen)
  return paintLight(form, { reflectance, glow, coats }, lighting)
}
