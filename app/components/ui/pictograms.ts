/** One part of a pictogram on its 100 grid: symbol filled, paper laid into it, a cut through it, or a stroke of that width. */
export interface PictogramPart {
  readonly d: string
  readonly as: 'symbol' | 'paper' | 'cut' | number
}

/** A hazard pictogram: its meaning in words and our own drawing of it. The frame is drawn by UiPictogram. */
export interface Pictogram {
  readonly words: string
  readonly parts: readonly PictogramPart[]
}

/**
 * The hazard pictograms a paint shop meets, by their code in the Globally Harmonized System (UN GHS, annex 1: black
 * symbol on white in a red frame set on a point). The symbols are drawn by us.
 */
export const PICTOGRAMS = {
  GHS02: {
    words: 'Flammable',
    parts: [
      { d: 'M51 18.5c2 9-4 13-8 19-2.5 3.5-4 6-4 10 0 1.5.3 3 .8 4.5-3.2-1.5-4.8-4.5-5-8-4 4.5-5.8 9-5.8 13 0 5.5 3.5 8.5 7 9.5h27c4.5-1.5 8-5.5 8-11 0-7-4-11-6.5-16-.8 3.5-2.3 5.5-5 6.5 2.5-9 .5-20-8.5-27.5Z', as: 'symbol' },
      { d: 'M50 65.5c-5 0-8-2.5-8-6.5 0-5 4-7 5-12 3 3 3.5 5.5 3.3 8 1.6-.8 2.5-2.3 2.7-4 3.2 3 5 5.5 5 8.2 0 4-3 6.3-8 6.3Z', as: 'paper' },
      { d: 'M36.5 70.5h27', as: 4 },
    ],
  },
  GHS04: {
    words: 'Gas under pressure',
    parts: [
      { d: 'M31.2 53.8L52.5 38.9C56.3 36.2 62.2 37.8 64.3 41.0C66.5 44.1 66.1 50.1 62.2 52.8L40.9 67.7C37.1 70.4 31.3 68.7 29.1 65.6C26.9 62.5 27.3 56.5 31.2 53.8ZM61.4 39.4L65.9 36.2L63.9 33.3L66.8 31.3L74.2 42.0L71.3 44.0L69.3 41.1L64.8 44.3Z', as: 'symbol' },
      { d: 'M34.9 57.3L53.7 44.1', as: 'cut' },
    ],
  },
  GHS05: {
    words: 'Corrosive',
    parts: [
      { d: 'M28.0 35.4L45.1 29.8L47.9 38.4L30.7 43.9C25.0 45.8 22.2 37.2 28.0 35.4ZM72.0 35.4L54.9 29.8L52.1 38.4L69.3 43.9C75.0 45.8 77.8 37.2 72.0 35.4Z', as: 'symbol' },
      { d: 'M31.2 39.0L46.5 34.1M68.8 39.0L53.5 34.1', as: 'cut' },
      { d: 'M45.5 40.5v2.5M45.5 47v2.5M41.5 45v2.5M54.5 40.5v2.5M54.5 47v2.5M58.5 45v2.5', as: 3 },
      { d: 'M24.5 56H38c.3 4.5 3.6 5 4.5 1.5.6 4 4 3.5 4.5-1.5h2v10.5H24.5V56Z', as: 'symbol' },
      { d: 'M51.5 60.5c0-2.6 2.700-3.6 5-2.6 1 3 3.800 2.6 4.5-.4l14.5-2v9.5L65 66.800c-4 .8-7.300.3-9.5-1.800l-3.200-3.200c-.5-.4-.8-.9-.8-1.300Z', as: 'symbol' },
    ],
  },
  GHS07: {
    words: 'Harmful or irritant',
    parts: [
      { d: 'M42.5 27.5c0-6 15-6 15 0 0 8-3.5 18-4.3 29h-6.4c-.8-11-4.3-21-4.3-29Z', as: 'symbol' },
      { d: 'M44 67a6 6 0 1 0 12 0a6 6 0 1 0-12 0', as: 'symbol' },
    ],
  },
  GHS08: {
    words: 'Health hazard',
    parts: [
      { d: 'M42 28.5a8 8 0 1 0 16 0a8 8 0 1 0-16 0', as: 'symbol' },
      { d: 'M33.5 72V52c0-9.5 6.5-13.5 16.5-13.5S66.5 42.5 66.5 52v20h-33Z', as: 'symbol' },
      { d: 'M50.0 42.5L52.5 50.7L60.8 48.8L55.0 55.0L60.8 61.2L52.5 59.3L50.0 67.5L47.5 59.3L39.2 61.3L45.0 55.0L39.2 48.8L47.5 50.7Z', as: 'paper' },
    ],
  },
  GHS09: {
    words: 'Hazardous to water life',
    parts: [
      { d: 'M24 61.5c7-2 12 1.5 19 0s24-1.5 33 0', as: 3 },
      { d: 'M57 61V33M57 50.5l-9.5-8M57 46l8.5-8M57 40.5l-5-7M57 55.5l8-6.5M50.5 45v-6M62 41v-5', as: 3 },
      { d: 'M41 69.5c4.5-5.5 13-5.5 18 0-5 5.5-13.5 5.5-18 0ZM42.5 69.5l-6.5-4.5c1 3 1 6 0 9l6.5-4.5Z', as: 'symbol' },
    ],
  },
} as const satisfies Record<string, Pictogram>

/** The code of a pictogram in the Globally Harmonized System. */
export type PictogramCode = keyof typeof PICTOGRAMS
