/** Reads the code in one picture of a video; undefined while there is none to be read. */
export type CodeReader = (video: HTMLVideoElement) => Promise<string | undefined>

/** What browsers that read codes by themselves offer; not in every browser, and not among its types. */
interface CodeDetector { detect: (source: HTMLVideoElement) => Promise<readonly { rawValue: string }[]> }
interface CodeDetectors { new (options: { formats: readonly string[] }): CodeDetector, getSupportedFormats: () => Promise<readonly string[]> }

/** Codes that are on bottles: those printed here, and those shops print. */
const FORMATS = ['qr_code', 'code_128', 'code_39', 'ean_13', 'ean_8', 'upc_a', 'data_matrix']
/** Long edge of the picture the slower way looks at, pixels. */
const EDGE = 640

/** The reader of this browser: its own where it has one, else one that reads QR codes only and is brought when it is wanted. */
export async function codeReader(): Promise<CodeReader> {
  return await ownReader() ?? await broughtReader()
}

async function ownReader(): Promise<CodeReader | undefined> {
  const detectors = (window as { BarcodeDetector?: CodeDetectors }).BarcodeDetector
  if (!detectors) return undefined
  const known = await detectors.getSupportedFormats().catch((): string[] => [])
  const formats = FORMATS.filter(format => known.includes(format))
  if (!formats.includes('qr_code')) return undefined
  const detector = new detectors({ formats })
  return async video => (await detector.detect(video))[0]?.rawValue
}

async function broughtReader(): Promise<CodeReader> {
  const { default: jsqr } = await import('jsqr')
  const canvas = document.createElement('canvas')
  const context = canvas.getContext('2d', { willReadFrequently: true })
  return (video) => {
    const share = Math.min(1, EDGE / Math.max(video.videoWidth, video.videoHeight, 1))
    canvas.width = Math.round(video.videoWidth * share)
    canvas.height = Math.round(video.videoHeight * share)
    if (!context || canvas.width === 0 || canvas.height === 0) return Promise.resolve(undefined)
    context.drawImage(video, 0, 0, canvas.width, canvas.height)
    const { data } = context.getImageData(0, 0, canvas.width, canvas.height)
    return Promise.resolve(jsqr(data, canvas.width, canvas.height)?.data || undefined)
  }
}
