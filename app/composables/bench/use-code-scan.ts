import { onBeforeUnmount, ref, type Ref } from 'vue'
import { codeReader } from './code-reader'

/** How often a picture of the camera is looked at, ms. */
const LOOK_MS = 200

/** Reading a code with the camera of this device. */
export interface CodeScan {
  /** Why the camera cannot be used; null while it can. */
  problem: Readonly<Ref<string | null>>
  /** Shows the camera in a video and looks until a code is read or it is stopped; the code, or undefined. */
  scan: (video: HTMLVideoElement) => Promise<string | undefined>
  stop: () => void
}

/** Reads one code with the camera; the camera is let go as soon as it is read, or nobody looks any more. */
export function useCodeScan(): CodeScan {
  const problem = ref<string | null>(null)
  let stream: MediaStream | undefined
  /** Goes up with every start and stop: what belongs to an earlier one ends. */
  let turn = 0

  function stop(): void {
    turn++
    for (const track of stream?.getTracks() ?? []) track.stop()
    stream = undefined
  }

  async function scan(video: HTMLVideoElement): Promise<string | undefined> {
    stop()
    const own = turn
    problem.value = null
    try {
      const opened = await navigator.mediaDevices.getUserMedia({ video: { facingMode: 'environment' }, audio: false })
      if (own !== turn) {
        for (const track of opened.getTracks()) track.stop()
        return undefined
      }
      stream = opened
      video.srcObject = opened
      await video.play()
      const read = await codeReader()
      while (own === turn) {
        const code = await read(video).catch(() => undefined)
        if (code !== undefined && own === turn) return code
        await new Promise(resolve => window.setTimeout(resolve, LOOK_MS))
      }
    }
    catch {
      if (own === turn) problem.value = 'The camera cannot be used here. Allow it in the browser, or type the code.'
    }
    finally {
      if (own === turn) stop()
    }
    return undefined
  }
  onBeforeUnmount(stop)
  return { problem, scan, stop }
}
