import { sql } from 'drizzle-orm'
import { expect, it } from 'vitest'
import { inTransactionAs } from '#server/services/in-transaction'
import { testDatabase } from './database'
import { testWorkshop } from './factories'

it('opens a workshop on a database of its own', async () => {
  const { workshopId } = await testWorkshop({ role: 'painter' })
  const db = await testDatabase()
  const rows = await inTransactionAs(db, { workshopId }, async tx => (await tx.execute(sql`select current_user as me, (select count(*)::int from workshops) as n`)).rows)
  expect(rows).toEqual([{ me: 'countershade_app', n: 1 }])
})
