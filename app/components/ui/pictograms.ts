/** One part of a pictogram on its 100 grid: symbol filled, paper cut out of it, or a stroke of that width. */
export interface PictogramPart {
  readonly d: string
  readonly as: 'symbol' | 'paper' | number
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
      { d: 'M51 23c2 9-4 13-8 19-2.5 3.5-4 6-4 10 0 1.5.3 3 .8 4.5-3.2-1.5-4.8-4.5-5-8-4 4.5-5.8 9-5.8 13 0 5.5 3.5 8.5 7 9.5h27c4.5-1.5 8-5.5 8-11 0-7-4-11-6.5-16-.8 3.5-2.3 5.5-5 6.5 2.5-9 .5-20-8.5-27.5Z', as: 'symbol' },
      { d: 'M50 70c-5 0-8-2.5-8-6.5 0-5 4-7 5-12 3 3 3.5 5.5 3.3 8 1.6-.8 2.5-2.3 2.7-4 3.2 3 5 5.5 5 8.2 0 4-3 6.3-8 6.3Z', as: 'paper' },
      { d: 'M33 75h34', as: 4 },
    ],
  },
  GHS04: {
    words: 'Gas under pressure',
    parts: [
      { d: 'M33.5 74.4a8 8 0 0 1-8-8l-.2-.2a8 8 0 0 1 2.3-5.5l28-28c3-3 8-3 11.3 0l.3.3c3 3 3 8 0 11.3l-28 28a8 8 0 0 1-5.7 2.1Z', as: 'symbol' },
      { d: 'M65.5 36 70 31.5M67.3 27.2 74.3 34.2', as: 4.5 },
    ],
  },
  GHS05: {
    words: 'Corrosive',
    parts: [
      { d: 'M26.5 40.5 44 34l2 5.2-17.5 6.5c-4 1-5.5-4-2-5.2ZM73.5 40.5 56 34l-2 5.2 17.5 6.5c4 1 5.5-4 2-5.2Z', as: 'symbol' },
      { d: 'M43.8 43.5v3M43.8 49.5v3M41 46.5v3M56.2 43.5v3M56.2 49.5v3M59 46.5v3', as: 2.6 },
      { d: 'M25 57.5h14.5c.5 3 3 4 4.3 1.5 1.3 2.5 3.7 1.5 4.2-1.5v7.5H25v-7.5Z', as: 'symbol' },
      { d: 'M52 60c0-1.5 2-2.5 4.5-2l1.5.4c.8 2.6 3.5 2.6 4.3.2L75 58v8H61c-3 0-4.5-1-6-3l-3-3Z', as: 'symbol' },
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
