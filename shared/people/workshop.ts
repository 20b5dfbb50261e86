import { z } from 'zod'
import { KELVIN_MAX, KELVIN_MIN } from '#shared/optics/kelvin-light'
import { OwnPlanning } from '#shared/quantities/planning-values'
import { OwnUnits } from '#shared/quantities/quantities'
import { NewPassword, PersonName } from './person'

export const WORKSHOP_NAME_MAX = 80

/** What the workshop measures in. Everything is kept in metric; this is how it is shown and typed. */
export const UNITS = ['metric', 'inch'] as const
export const Units = z.enum(UNITS)
export type Units = z.output<typeof Units>

/** The units as a person reads them. */
export const UNITS_WORDS: Readonly<Record<Units, string>> = {
  metric: 'Millimetres, millilitres, bar, °C',
  inch: 'Inches, fluid ounces, psi, °F',
}

export const WorkshopName = z.string().trim().min(1, 'The workshop needs a name.').max(WORKSHOP_NAME_MAX)

/** Colour temperature of the workshop's own lamp, kelvin, as printed on it; null while it has named none. */
export const OwnLamp = z.number().int('Give whole kelvin, such as 5000.').min(KELVIN_MIN).max(KELVIN_MAX).nullable()

/** How a workshop is set up. A part it never chose has its default. */
export const WorkshopSettings = z.object({
  units: Units.default('metric'),
  /** Units chosen otherwise than the system has them: kPa in a metric workshop. */
  ownUnits: OwnUnits.default({}),
  /** Planning values the workshop knows better than the usual. */
  planning: OwnPlanning.default({}),
  ownLamp: OwnLamp.default(null),
})
export type WorkshopSettings = z.output<typeof WorkshopSettings>

/** One more workshop for somebody who is signed in. */
export const WorkshopDraft = z.object({ name: WorkshopName })
export type WorkshopDraft = z.output<typeof WorkshopDraft>

/** Opening a first workshop, from the link in the letter. */
export const SignUp = z.object({ name: PersonName, workshopName: WorkshopName, password: NewPassword })
export type SignUp = z.output<typeof SignUp>

/** Changing a workshop; what is left out stays. */
export const WorkshopChange = z.object({ name: WorkshopName, units: Units, ownUnits: OwnUnits, planning: OwnPlanning, ownLamp: OwnLamp }).partial()
export type WorkshopChange = z.output<typeof WorkshopChange>

export const WorkshopParams = z.object({ workshopId: z.uuid() })

/** Going over to another of one's workshops. */
export const WorkshopChoice = z.object({ workshopId: z.uuid() })
export type WorkshopChoice = z.output<typeof WorkshopChoice>

/** A workshop as its people see it. */
export interface WorkshopView extends WorkshopSettings {
  id: string
  name: string
  isDemo: boolean
  since: string
}
