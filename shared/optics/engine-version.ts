/**
 * Version of the colour engine; stored beside every colour and every paint it worked out.
 *
 * It rises whenever the same inputs would give a visibly different colour. What was worked out under another version is shown as
 * it stands: 1 had no fluorescent light; since 2 a fluorescent carries the absorption that feeds its glow.
 */
export const ENGINE_VERSION = '2'
