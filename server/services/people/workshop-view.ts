import type { workshops } from '#server/db/tables/people'
import { WorkshopSettings, type WorkshopView } from '#shared/people/workshop'

export type WorkshopRow = typeof workshops.$inferSelect

/** How a workshop is set up; what an older version of the settings did not have yet has its default. */
export function settingsOf(row: Pick<WorkshopRow, 'settings'>): WorkshopSettings {
  const settings = WorkshopSettings.safeParse(row.settings)
  return settings.success ? settings.data : WorkshopSettings.parse({})
}

/** A workshop as it travels to its people. */
export function workshopView(row: WorkshopRow): WorkshopView {
  return { id: row.id, name: row.name, ...settingsOf(row), isDemo: row.isDemo, since: row.createdAt.toISOString() }
}
