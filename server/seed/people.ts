import { randomBytes, randomInt } from 'node:crypto'
import type { Database } from '#server/db/client'
import { memberships } from '#server/db/tables'
import type { Ctx } from '#server/services/ctx'
import { declare, inTransactionAs } from '#server/services/in-transaction'
import { addPerson } from '#server/services/people/add-person'
import { openSession } from '#server/services/people/open-session'
import { openWorkshop } from '#server/services/people/open-workshop'
import { hashPassword } from '#server/services/people/password-hash'
import { ROLE_WORDS, ROLES, type Role } from '#shared/people/roles'

export const DEMO_WORKSHOP = 'Ninth Weir workshop'
const DOMAIN = 'ninth-weir.example'

/** A way into the demo workshop, shown where it was set up. */
export interface DemoSignIn { email: string, password: string, role: string }

const WATERS = ['slack', 'clear', 'tea', 'evening', 'first', 'murky', 'shallow', 'winter', 'quiet', 'green']
const THINGS = ['tide', 'weir', 'pool', 'riffle', 'ice', 'reed', 'pier', 'gravel', 'lamp', 'ripple']

/** A password that can be typed from a terminal; made anew for each copy, since a copy may be reachable by others. */
function demoPassword(): string {
  const pick = (words: readonly string[]) => words[randomInt(words.length)]!
  return `${pick(WATERS)}-${pick(THINGS)}-${randomBytes(3).toString('hex')}`
}

/** Opens the demo workshop with one person for each role, known by the role's own words; gives the context of each. */
export async function openDemoWorkshop(db: Database): Promise<{ ctxOf: Record<Role, Ctx>, signIns: DemoSignIn[] }> {
  const ctxOf: Partial<Record<Role, Ctx>> = {}
  const signIns: DemoSignIn[] = []
  for (const role of ROLES) {
    const email = `${role}@${DOMAIN}`
    const password = demoPassword()
    const passwordHash = await hashPassword(password)
    const workshopId = ctxOf.owner?.workshopId
    ctxOf[role] = await inTransactionAs(db, {}, async (tx) => {
      const person = await addPerson(tx, { email, name: ROLE_WORDS[role], passwordHash })
      const sessionId = await openSession(tx, person.id, null, 'Setting up the demo')
      if (!workshopId) return { ...await openWorkshop(tx, { personId: person.id, sessionId }, DEMO_WORKSHOP, { isDemo: true }), db }
      await declare(tx, { workshopId })
      await tx.insert(memberships).values({ workshopId, personId: person.id, role })
      return { db, personId: person.id, sessionId, workshopId, role }
    })
    signIns.push({ email, password, role })
  }
  return { ctxOf: complete(ctxOf), signIns }
}

function complete(ctxOf: Partial<Record<Role, Ctx>>): Record<Role, Ctx> {
  const { owner, painter, bench, desk } = ctxOf
  if (!owner || !painter || !bench || !desk) throw new Error('The demo workshop lacks a role.')
  return { owner, painter, bench, desk }
}
