const A_YEAR_IN_SECONDS = 365 * 24 * 60 * 60
/** Three rising tones: heard through a fan and ear muffs. Hz, and when each begins, s. */
const TONES = [[660, 0], [880, 0.28], [1320, 0.56]] as const
const TONE_SECONDS = 0.22
const SHAKES_MS = [300, 120, 300, 120, 500]

/** The sound of this tablet's timers: whether it is on, kept in a cookie, and how it rings. */
export function useBenchSound() {
  const isOn = useCookie<boolean>('bench-sound', { default: () => true, maxAge: A_YEAR_IN_SECONDS, sameSite: 'lax', path: '/' })
  let audio: AudioContext | undefined

  /** Browsers let a page sound only after a touch: called at the first one. */
  function wake() {
    audio ??= new AudioContext()
    if (audio.state === 'suspended') void audio.resume()
  }

  function ring() {
    // Shaking needs no sound, and a tablet without a shaker ignores it.
    if ('vibrate' in navigator) navigator.vibrate(SHAKES_MS)
    if (!isOn.value || !audio) return
    for (const [pitch, at] of TONES) {
      const tone = audio.createOscillator()
      const volume = audio.createGain()
      const from = audio.currentTime + at
      tone.type = 'triangle'
      tone.frequency.value = pitch
      volume.gain.setValueAtTime(0, from)
      volume.gain.linearRampToValueAtTime(0.6, from + 0.02)
      volume.gain.linearRampToValueAtTime(0, from + TONE_SECONDS)
      tone.connect(volume).connect(audio.destination)
      tone.start(from)
      tone.stop(from + TONE_SECONDS)
    }
  }
  return { isOn, wake, ring }
}
