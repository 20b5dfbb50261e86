/** By what two colours are told apart, if at all. */
export type BassTold = 'colour' | 'brightness' | 'nothing'

const CONES = 'What a largemouth bass’s two cones would tell apart'

/** A sentence on two colours. It speaks of cones, never of what a bass does about it. */
export const BASS_PAIR_WORDS: Readonly<Record<BassTold, string>> = {
  colour: `${CONES}: these two, by colour.`,
  brightness: `${CONES}: not these two by colour; one is the brighter.`,
  nothing: `${CONES}: not these two.`,
}

/** What stands beside a picture of the two cones. */
export const BASS_MAP_WORDS
  = `${CONES}, as a map: orange where the long-wave cone takes more, blue where the middle-wave cone does, grey where they take alike. Two places of one colour here are one colour to both cones. It says nothing of what a bass does.`

/** What its two cones make of places that lie side by side, in one sentence for each way of telling. */
export function bassMapWords(pairs: readonly { names: readonly [string, string], by: BassTold }[]): string[] {
  const told = (by: BassTold) => inWords(pairs.filter(pair => pair.by === by).map(({ names: [one, other] }) => `${one} from ${other}`))
  const [colour, brightness, nothing] = [told('colour'), told('brightness'), told('nothing')]
  return [
    ...(colour ? [`${CONES}, by colour: ${colour}.`] : []),
    ...(brightness ? [`By brightness alone: ${brightness}.`] : []),
    ...(nothing ? [`Not at all: ${nothing}.`] : []),
  ]
}

function inWords(phrases: readonly string[]): string {
  return phrases.length < 2 ? phrases.join('') : `${phrases.slice(0, -1).join(', ')} and ${phrases.at(-1)}`
}
