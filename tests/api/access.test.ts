import { existsSync, readdirSync } from 'node:fs'
import { beforeAll, describe, expect, it } from 'vitest'
import type { Ctx } from '#server/services/ctx'
import { ROLES } from '#shared/people/roles'
import { type Ground, METHODS, type Who } from './access/row'
import { ACCESS_TABLE } from './access-table'
import { asOwner } from './database'
import { testPerson, testWorkshop } from './factories'
import { type TestServer, testServer } from './server'

const WHO: readonly Who[] = [...ROLES, 'stranger', 'signedOut']

/** Refuses every address that is no route of ours; it is not a route itself. */
const CATCH_ALL = 'server/api/[...path].ts'

let server: TestServer
beforeAll(async () => {
  server = await testServer()
}, 300_000)

const routes = ['server/api', 'server/routes'].flatMap(filesIn).filter(file => file !== CATCH_ALL).map(routeOf).sort()

it('names every route there is, once, and none that is not', () => {
  const rows = ACCESS_TABLE.map(row => `${row.method} ${row.path}`).sort()
  expect(rows).toEqual(routes)
})

describe.each(ACCESS_TABLE.map(row => ({ name: `${row.method} ${row.path}`, row })))('$name', ({ row }) => {
  it.each(WHO)('answers %s as the table says', async (who) => {
    // Everybody here knocks from one address: what the doors counted so far is not what is being looked at.
    await asOwner('delete from tries')
    const ground = await groundFor(who)
    const { url, body, headers, secret = [] } = await row.make(ground)
    const response = await server.ask(row.method, url, { as: await asking(who, ground), body, headers })
    const answer = await answerOf(response)
    expect({ status: response.status, answer: response.status === row.who[who] ? '' : answer }).toEqual({ status: row.who[who], answer: '' })
    if (who === 'stranger' && !row.letsIn) expectNothingOf(ground, secret, answer)
    if (response.status >= 400) expect(response.headers.get('content-type')).toMatch(/^(application\/problem\+json|text\/html)/)
  })
})

/** What was answered; of an answer that goes on, the first thing it tells. */
async function answerOf(response: Response): Promise<string> {
  if (!response.headers.get('content-type')?.startsWith('text/event-stream') || !response.body) return response.text()
  const bytes = response.body.getReader()
  for (let text = ''; ;) {
    const { value, done } = await bytes.read()
    text += new TextDecoder().decode(value)
    if (!done && !/^data: .*\n\n/m.test(text)) continue
    await bytes.cancel()
    return text
  }
}

async function asking(who: Who, ground: Ground): Promise<Ctx | null> {
  if (who === 'signedOut') return null
  return who === 'stranger' ? (await testWorkshop({ role: 'owner', name: 'Elsewhere' })).ctx : ground[who]
}

async function groundFor(who: Who): Promise<Ground> {
  const { ctx: owner, workshopId } = await testWorkshop({ role: 'owner' })
  const [painter, bench, desk] = await Promise.all((['painter', 'bench', 'desk'] as const).map(role => testPerson({ workshopId, role })))
  return { who, owner, painter: painter!.ctx, bench: bench!.ctx, desk: desk!.ctx }
}

function expectNothingOf(ground: Ground, secret: readonly string[], answer: string): void {
  for (const word of secret) expect(answer).not.toContain(word)
  if (!answer.startsWith('{"type":"urn:')) expect(answer).not.toContain(ground.owner.workshopId)
}

function filesIn(folder: string): string[] {
  if (!existsSync(folder)) return []
  return readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter(file => file.endsWith('.ts')).map(file => `${folder}/${file.replaceAll('\\', '/')}`)
}

/** 'server/api/paints/[paintId]/index.get.ts' is GET /api/paints/[paintId]; a file of no method answers GET. */
function routeOf(file: string): string {
  const method = METHODS.find(one => file.endsWith(`.${one.toLowerCase()}.ts`)) ?? 'GET'
  const path = file.replace(/^server\/(?:routes\/)?/, '/').replace(/(?:\.(?:get|post|put|patch|delete))?\.ts$/, '').replace(/\/index$/, '')
  return `${method} ${path}`
}
