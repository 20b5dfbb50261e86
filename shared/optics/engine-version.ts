/**
 * Version of the colour engine; stored beside every colour and every paint it worked out.
 *
 * It rises whenever the same inputs would give a visibly different colour.
 */
export const ENGINE_VERSION = '1'
