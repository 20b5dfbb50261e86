import { sendReport } from './send-report'

/** Hands on what the thread of the engines has to report. */
await sendReport(() => new Promise((resolve, reject) => {
  const worker = new Worker('/engines-worker.js', { type: 'module' })
  worker.addEventListener('message', ({ data }: MessageEvent<{ value?: unknown, error?: string }>) => data.error ? reject(new Error(data.error)) : resolve(data.value))
  worker.addEventListener('error', event => reject(new Error(event.message)))
  worker.postMessage('begin')
}))
