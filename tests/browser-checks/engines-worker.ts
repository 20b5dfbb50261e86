import { agreementOf } from './agreement/agreement-report'
import { webgl2Engine } from '~/workers/webgl2/webgl2-engine'
import { plainEngine } from '#shared/picture/engine/plain-engine'
import { simdEngine } from '#shared/picture/engine/simd-engine'

/** Holds every engine of this browser against double precision, in a thread as pictures are painted in one. */
self.addEventListener('message', () => {
  try {
    const engines = [plainEngine(), simdEngine(), webgl2Engine()].filter(engine => engine !== undefined)
    self.postMessage({ value: agreementOf(engines) })
  }
  catch (error) {
    self.postMessage({ error: error instanceof Error ? error.stack : String(error) })
  }
})
