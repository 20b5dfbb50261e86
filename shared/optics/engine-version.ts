/**
 * Version of the colour engine; stored beside every colour and every paint it worked out.
 *
 * It rises whenever the same inputs would give a visibly different colour (tests/unit/optics/golden-stacks.test.ts). A frozen look
 * keeps the data its paints had: 1 had no fluorescent light; since 2 a fluorescent carries the absorption that feeds its glow; since 3
 * pearls that share a cup each keep their colour, where paints of 1 and 2 show the commonest of them as they did.
 */
export const ENGINE_VERSION = '3'

/** Versions whose cups of several pearls showed the commonest alone. */
export const ONE_PEARL_VERSIONS: readonly string[] = ['1', '2']
