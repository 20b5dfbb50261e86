import { and, eq, gt, lt, or } from 'drizzle-orm'
import { colourFills, schemeColours, type Side } from '#server/db/tables'
import { promiseOnThread } from '#server/pictures/promise-threads'
import type { Ctx } from '#server/services/ctx'
import { inTransaction } from '#server/services/in-transaction'
import { assertMay } from '#server/services/people/assert-may'
import { Problem } from '#shared/errors/problem'
import { ENGINE_VERSION } from '#shared/optics/engine-version'
import type { Look } from '#shared/picture/look'
import { usedMaterials } from '#shared/scheme/used-materials'
import { materialsToday } from './materials-today'
import { revisionInWorkshop, schemeInWorkshop } from './scheme-in-workshop'

/** Looks found to be due at once. */
const BATCH = 50

interface Due { schemeId: string, side: Side, stamp: number }

/** Workshops whose colours are being worked out by this process. */
const underWay = new Map<string, Promise<number>>()

/**
 * Works out the colours of every look of the workshop that is due, one after another; asked again meanwhile, it joins. Whoever comes to
 * the wall sets it going: it says nothing of a look to them. Several processes doing it at once do no harm. Answers how many it did.
 */
export async function fillColours(ctx: Ctx): Promise<number> {
  assertMay(ctx, 'scheme:look')
  const running = underWay.get(ctx.workshopId) ?? fill(ctx).finally(() => underWay.delete(ctx.workshopId))
  underWay.set(ctx.workshopId, running)
  return running
}

async function fill(ctx: Ctx): Promise<number> {
  let filled = 0
  /** A look that changes while it is worked out is due again: it waits for the next time, so that this ends. */
  const tried = new Set<string>()
  for (;;) {
    const due = (await dueLooks(ctx)).filter(({ schemeId, side }) => !tried.has(`${schemeId} ${side}`))
    if (due.length === 0) return filled
    for (const each of due) {
      tried.add(`${each.schemeId} ${each.side}`)
      if (await fillOne(ctx, each)) filled++
    }
  }
}

const ofOtherEngine = or(lt(colourFills.engineVersion, ENGINE_VERSION), gt(colourFills.engineVersion, ENGINE_VERSION))

function dueLooks(ctx: Ctx): Promise<Due[]> {
  return inTransaction(ctx, tx => tx.db.select({ schemeId: colourFills.schemeId, side: colourFills.side, stamp: colourFills.stamp })
    .from(colourFills).where(and(eq(colourFills.workshopId, tx.workshopId), ofOtherEngine)).limit(BATCH))
}

async function fillOne(ctx: Ctx, { schemeId, side, stamp }: Due): Promise<boolean> {
  const zones = await promised(ctx, schemeId, side)
  return inTransaction(ctx, async (tx) => {
    const mine = await tx.db.update(colourFills).set({ engineVersion: ENGINE_VERSION })
      .where(and(eq(colourFills.workshopId, tx.workshopId), eq(colourFills.schemeId, schemeId), eq(colourFills.side, side), eq(colourFills.stamp, stamp)))
      .returning({ stamp: colourFills.stamp })
    if (mine.length === 0) return false
    await tx.db.delete(schemeColours).where(and(eq(schemeColours.workshopId, tx.workshopId), eq(schemeColours.schemeId, schemeId), eq(schemeColours.side, side)))
    if (zones.length > 0) {
      await tx.db.insert(schemeColours).values(zones.map(({ zone, label, lab: [lightness, a, b] }) => ({ workshopId: tx.workshopId, schemeId, side, zone, label, lightness, a, b })))
    }
    return true
  })
}

/** None for a look that cannot be worked out: it is found by everything but a colour, and tried again when it changes. */
async function promised(ctx: Ctx, schemeId: string, side: Side) {
  try {
    return await promiseOnThread(await inTransaction(ctx, tx => lookOf(tx, schemeId, side)))
  }
  catch (error) {
    if (!(error instanceof Problem)) console.error(`The colours of scheme ${schemeId} could not be worked out:`, error)
    return []
  }
}

async function lookOf(tx: Ctx, schemeId: string, side: Side): Promise<Look> {
  const { draft, headNumber } = await schemeInWorkshop(tx, schemeId)
  switch (side) {
    case 'head': {
      const { body, materials } = await revisionInWorkshop(tx, schemeId, headNumber)
      return { body, materials }
    }
    case 'draft': return { body: draft, materials: usedMaterials(draft, await materialsToday(tx, draft, 'used')) }
  }
}
