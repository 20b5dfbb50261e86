import { DEMO_PAINTS, demoPaint, type DemoPaintName } from './paints'
import { DEMO_SCHEMES } from './schemes'
import { bodyOf, type DemoScheme } from './write-scheme'
import type { Ctx } from '#server/services/ctx'
import { listBlanks } from '#server/services/blank/list-blanks'
import { createScheme } from '#server/services/scheme/create-scheme'
import { getScheme } from '#server/services/scheme/get-scheme'
import { publishScheme } from '#server/services/scheme/publish-scheme'
import { saveDraft } from '#server/services/scheme/save-draft'
import { addPaint } from '#server/services/shelf/add-paint'
import type { SchemeBody } from '#shared/scheme/body'
import type { RevisionView } from '#shared/scheme/scheme-view'

/** A finish of the demo wall with its newest revision. */
export interface PublishedDemo { plan: DemoScheme, schemeId: string, revision: RevisionView }

/** Fills the shelf; gives each paint's id by its name. */
async function fillShelf(painter: Ctx): Promise<Map<DemoPaintName, string>> {
  const ids = new Map<DemoPaintName, string>()
  for (const name of Object.keys(DEMO_PAINTS) as DemoPaintName[]) ids.set(name, (await addPaint(painter, demoPaint(name))).id)
  return ids
}

/** The shelf and the wall: every demo finish, published twice, the second time with what the first lacked. */
export async function paintDemoWall(painter: Ctx): Promise<PublishedDemo[]> {
  const paintIds = await fillShelf(painter)
  const blankIds = new Map((await listBlanks(painter)).map(blank => [blank.name, blank.id]))
  const published: PublishedDemo[] = []
  for (const plan of DEMO_SCHEMES) {
    const body = bodyOf(plan, blankIds.get(plan.blank)!, paintIds)
    const scheme = await createScheme(painter, { name: plan.name, fish: plan.fish, blankId: body.blankId, body: withoutLater(body, plan) })
    await publishScheme(painter, scheme.id, scheme.version, { note: plan.notes[0] })
    const saved = await saveDraft(painter, scheme.id, (await getScheme(painter, scheme.id)).version, body)
    published.push({ plan, schemeId: scheme.id, revision: await publishScheme(painter, scheme.id, saved.version, { note: plan.notes[1] }) })
  }
  return published
}

function withoutLater(body: SchemeBody, plan: DemoScheme): SchemeBody {
  return { ...body, stack: body.stack.filter(item => item.act !== 'coat' || !plan.added.includes(item.coat.name)) }
}
