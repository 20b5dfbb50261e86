import { webgl2Engine } from '../../app/workers/webgl2/webgl2-engine'
import { plainEngine } from '#shared/picture/engine/plain-engine'
import { agreementOf } from './agreement/agreement-report'

/** Holds every engine of this browser against double precision, in a thread as pictures are painted in one. */
self.addEventListener('message', () => {
  const onGraphics = webgl2Engine()
  const engines = [plainEngine(), ...(onGraphics ? [onGraphics] : [])]
  try {
    self.postMessage({ value: agreementOf(engines) })
  }
  catch (error) {
    self.postMessage({ error: error instanceof Error ? error.stack : String(error) })
  }
})
