/** Zones of the body that every blank has; they follow its form. */
export const BODY_ZONES = [
  'body', 'back', 'upper-flank', 'lower-flank', 'belly', 'top', 'bottom', 'head', 'trunk', 'gill-cover', 'tail',
] as const
export type BodyZone = typeof BODY_ZONES[number]

/** A zone of a blank: a zone of its body, or one of its fins by id. */
export type ZoneName = BodyZone | `fin:${string}`

/** What each body zone is called. */
export const ZONE_LABELS: Readonly<Record<BodyZone, string>> = {
  'body': 'Whole body',
  'back': 'Back',
  'upper-flank': 'Upper flank',
  'lower-flank': 'Lower flank',
  'belly': 'Belly',
  'top': 'Top half',
  'bottom': 'Bottom half',
  'head': 'Head',
  'trunk': 'Trunk',
  'gill-cover': 'Gill cover',
  'tail': 'Tail',
}

/** Zones of the body by name, in the order people read them: back to belly, then nose to tail. */
export const ZONE_NAMES: readonly BodyZone[] = BODY_ZONES

/** The zone of one fin. */
export function finZone(id: string): ZoneName {
  return `fin:${id}`
}

/** The fin a zone stands for; undefined for zones of the body. */
export function finOfZone(zone: ZoneName): string | undefined {
  return zone.startsWith('fin:') ? zone.slice(4) : undefined
}
