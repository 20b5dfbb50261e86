/** How loud timers ring. */
export type BenchSound = 'off' | 'soft' | 'loud'

const A_YEAR_IN_SECONDS = 365 * 24 * 60 * 60
/** Three rising tones: heard through a fan and ear muffs. Hz, and when each begins, s. */
const TONES = [[660, 0], [880, 0.28], [1320, 0.56]] as const
const TONE_SECONDS = 0.22
const GAIN: Readonly<Record<BenchSound, number>> = { off: 0, soft: 0.15, loud: 0.9 }
const SHAKES_MS = [300, 120, 300, 120, 500]

/** The ring of this tablet's timers: how loud, kept in a cookie, and how it sounds and shakes. */
export function useBenchSound() {
  const loudness = useCookie<BenchSound>('bench-ring', { default: () => 'loud', maxAge: A_YEAR_IN_SECONDS, sameSite: 'lax', path: '/' })
  let audio: AudioContext | undefined

  /** Browsers let a page sound only after a touch: called at every one, since a tablet that slept has to be woken anew. */
  function wake() {
    audio ??= new AudioContext()
    if (audio.state === 'suspended') void audio.resume()
  }

  function ring() {
    // Shaking needs no sound, and a tablet without a shaker ignores it.
    if ('vibrate' in navigator) navigator.vibrate(SHAKES_MS)
    const gain = GAIN[loudness.value]
    if (gain === 0 || !audio) return
    for (const [pitch, at] of TONES) {
      const tone = audio.createOscillator()
      const volume = audio.createGain()
      const from = audio.currentTime + at
      tone.type = 'triangle'
      tone.frequency.value = pitch
      volume.gain.setValueAtTime(0, from)
      volume.gain.linearRampToValueAtTime(gain, from + 0.02)
      volume.gain.linearRampToValueAtTime(0, from + TONE_SECONDS)
      tone.connect(volume).connect(audio.destination)
      tone.start(from)
      tone.stop(from + TONE_SECONDS)
    }
  }
  return { loudness, wake, ring }
}
