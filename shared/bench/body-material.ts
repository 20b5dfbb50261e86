import { z } from 'zod'

/** What a body is made of, as far as heat is concerned. */
export const BODY_MATERIALS = ['wood', 'foam', 'hollow plastic', 'resin'] as const
export const BodyMaterial = z.enum(BODY_MATERIALS)
export type BodyMaterial = z.output<typeof BodyMaterial>

/**
 * What a body bears on its surface, °C, with room to spare. Foam: the lower end of 43 to 52 °C (heat resistance of rigid foams,
 * maker's guide). The others are common practice: air in a hollow body swells, pitch weeps out of warm wood, cast resin creeps.
 * Planning values: the maker of the body knows better.
 */
export const BODY_BEARS: Readonly<Record<BodyMaterial, number>> = { 'foam': 43, 'hollow plastic': 45, 'wood': 60, 'resin': 55 }
