// What one download of the engines holds; bundled to be weighed.
export { plainEngine } from '#shared/picture/engine/plain-engine'
export { simdEngine } from '#shared/picture/engine/simd-engine'
export { steadyEngine } from '#shared/picture/engine/steady-engine'
export { offerWebgl2 } from '../../app/workers/webgl2/offer-webgl2'
