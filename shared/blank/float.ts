/** g/cm³. Usual handbook and workshop values (common practice): pieces of one wood differ, so weigh each blank. */
export const DENSITIES = {
  balsa: 0.15, basswood: 0.4, cedar: 0.38, alder: 0.38, pine: 0.42, maple: 0.69,
  lead: 11.34, tungsten: 19.3, steel: 7.9, brass: 8.5, polycarbonate: 1.2,
} as const

/** Something a lure is made of: its mass in g and the volume it takes in the water, cm³. */
export interface LurePart {
  mass: number
  volume: number
}

/** Whether a lure floats, and how hard. Grams. */
export interface FloatCheck {
  /** Mass of all parts. */
  mass: number
  /** Mass of the water they push aside when under. */
  displaced: number
  /** + lifts, - pulls down. */
  netLift: number
  /** `hangs` within a hundredth of a gram for each ten grams. */
  outcome: 'floats' | 'hangs' | 'sinks'
}

function positive(name: string, value: number): void {
  if (!(value > 0)) throw new RangeError(`${name} is more than nothing`)
}

/** Density in g/cm³ from a wood or lead chart in pounds per cubic foot (453.59237 g and 28 316.846592 cm³, exact). */
export function densityFromPounds(poundsPerCubicFoot: number): number {
  return poundsPerCubicFoot * 453.59237 / 28316.846592
}

/** A part of known mass and density (g/cm³). */
export function partByMass(mass: number, density: number): LurePart {
  positive('a density', density)
  return { mass, volume: mass / density }
}

/** A part of known volume (cm³) and density (g/cm³). */
export function partByVolume(volume: number, density: number): LurePart {
  positive('a density', density)
  return { mass: volume * density, volume }
}

/** The dried film of paint and clear: area in mm², thickness in mm, density in g/cm³. */
export function filmPart(area: number, thickness: number, density: number): LurePart {
  return partByVolume(area * thickness / 1000, density)
}

const HANGS_WITHIN = 0.001

/**
 * Whether the parts together float. Calculated from the numbers given; a tank shows what the lure really does.
 * @param water density of the water, g/cm³
 */
export function checkFloat(parts: readonly LurePart[], water: number): FloatCheck {
  positive('the density of water', water)
  const mass = parts.reduce((sum, part) => sum + part.mass, 0)
  const displaced = water * parts.reduce((sum, part) => sum + part.volume, 0)
  const netLift = displaced - mass
  const outcome = Math.abs(netLift) <= HANGS_WITHIN * mass ? 'hangs' : netLift > 0 ? 'floats' : 'sinks'
  return { mass, displaced, netLift, outcome }
}

/**
 * Ballast, g, that makes the parts hang in the water. Negative when they sink already.
 * @param ballast density of the ballast, g/cm³, heavier than water
 * @param letInto density of the wood the ballast replaces; absent when it hangs outside
 */
export function ballastForNeutral(parts: readonly LurePart[], water: number, ballast: number, letInto?: number): number {
  if (!(ballast > water)) throw new RangeError('ballast is heavier than water')
  const replaced = letInto ?? water
  if (!(replaced < ballast)) throw new RangeError('ballast is heavier than what it replaces')
  return checkFloat(parts, water).netLift / (1 - replaced / ballast)
}

/**
 * Volume (cm³) and density (g/cm³) of a piece of wood that hangs in the water with ballast tied on.
 * @param wood mass of the wood, g
 * @param ballast mass of the ballast, g
 */
export function woodFromNeutralFloat(wood: number, ballast: number, water: number, ballastDensity: number): { volume: number, density: number } {
  positive('the mass of wood', wood)
  positive('the density of water', water)
  const volume = (wood + ballast) / water - ballast / ballastDensity
  positive('the volume of wood', volume)
  return { volume, density: wood / volume }
}
