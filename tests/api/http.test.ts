import { connect } from 'node:net'
import { beforeAll, describe, expect, it } from 'vitest'
import { asOwner } from './database'
import { testPerson, testWorkshop } from './factories'
import { type TestServer, cookieOf, testServer } from './server'

let server: TestServer
beforeAll(async () => {
  server = await testServer()
}, 300_000)

const problemOf = async (response: Response) => ({ type: response.headers.get('content-type'), ...await response.json() as object })

describe('a refusal', () => {
  it('is a problem as RFC 9457 has it, with our code', async () => {
    expect(await problemOf(await server.ask('GET', '/api/people'))).toEqual({
      type: 'urn:countershade:problem:auth:signed-out', title: 'Not signed in', status: 401, code: 'auth/signed-out',
    })
    const response = await server.ask('GET', '/api/people')
    expect(response.headers.get('content-type')).toBe('application/problem+json')
    expect(response.headers.get('cache-control')).toBe('no-store')
  })

  it('of an address that is no route is one too', async () => {
    const response = await server.ask('GET', '/api/nothing/here')
    expect(response.status).toBe(404)
    expect(await response.json()).toMatchObject({ code: 'request/not-found' })
  })

  it('of what was typed names each field', async () => {
    const response = await server.ask('POST', '/api/sign-in', { body: { email: 'no address', password: '' } })
    expect(response.status).toBe(422)
    expect(await response.json()).toMatchObject({ code: 'input/invalid', fields: [{ path: 'email' }, { path: 'password' }] })
  })

  it.each(['{', '"text"', 'null', '[]'])('of a body %s is not a failure of ours', async (body) => {
    const response = await server.ask('POST', '/api/sign-in', { body, headers: { 'content-type': 'application/json' } })
    expect(response.status).toBe(422)
  })

  it('meets a form of another site that pretends to be JSON', async () => {
    const response = await server.ask('POST', '/api/sign-up', { body: '{"email":"a@b.example"}', headers: { 'content-type': 'text/plain' } })
    expect(response.status).toBe(422)
  })
})

describe('a change', () => {
  it.each([
    ['another site says so', { origin: 'https://bad.example' }],
    ['the browser says cross-site', { 'sec-fetch-site': 'cross-site' }],
    ['the browser says same-site, which is a neighbour', { 'sec-fetch-site': 'same-site' }],
    ['nobody says where it is from', { origin: '' }],
    ['a page without an origin says so', { origin: 'null' }],
  ])('is refused when %s', async (_, headers) => {
    const { ctx } = await testWorkshop()
    const response = await server.ask('POST', '/api/workshops', { as: ctx, body: { name: 'Taken over' }, headers })
    expect(response.status).toBe(403)
    expect(await response.json()).toMatchObject({ code: 'request/forbidden-origin' })
  })

  it('is taken from our own page', async () => {
    const { ctx } = await testWorkshop()
    const response = await server.ask('POST', '/api/workshops', { as: ctx, body: { name: 'A second bench' }, headers: { 'sec-fetch-site': 'same-origin' } })
    expect(response.status).toBe(201)
  })

  it('sent twice with one key is made once, also when both arrive together', async () => {
    const { ctx } = await testWorkshop()
    const key = { 'idempotency-key': crypto.randomUUID() }
    const send = (name: string) => server.ask('POST', '/api/workshops', { as: ctx, body: { name }, headers: key })
    const answers = await Promise.all([send('Once'), send('Once')])
    answers.push(await send('Once'))
    expect(answers.map(answer => answer.status)).toEqual([201, 201, 201])
    const bodies = await Promise.all(answers.map(answer => answer.json()))
    expect(bodies[1]).toEqual(bodies[0])
    expect(bodies[2]).toEqual(bodies[0])
    expect(await asOwner('select 1 from memberships where person_id = $1', [ctx.personId])).toHaveLength(2)
    expect((await send('Something else')).status).toBe(422)
  })

  it('that failed leaves its key free', async () => {
    const { ctx } = await testWorkshop()
    const headers = { 'idempotency-key': crypto.randomUUID() }
    expect((await server.ask('POST', '/api/workshops', { as: ctx, body: { name: '' }, headers })).status).toBe(422)
    expect((await server.ask('POST', '/api/workshops', { as: ctx, body: { name: 'Now' }, headers })).status).toBe(201)
  })
})

describe('a body that is too large', () => {
  it('is refused by its length', async () => {
    const response = await server.ask('POST', '/api/sign-in', { body: { email: 'a@b.example', password: 'x'.repeat(1_100_000) } })
    expect(response.status).toBe(413)
  })

  it('is refused while it arrives in pieces and says no length', async () => {
    const status = await sentInPieces(server.url, 3_000_000)
    expect(status).toBe(413)
  })
})

describe('the session', () => {
  it('gives a visitor no cookie', async () => {
    for (const path of ['/api/session', '/api/people', '/sign-in']) expect((await server.ask('GET', path)).headers.get('set-cookie') ?? '').not.toContain('countershade')
  })

  it('comes in a cookie that no script and no other site can use, and ends for every process at once', async () => {
    const second = await testServer()
    const { ctx } = await testWorkshop()
    const cookie = await cookieOf(ctx)
    const elsewhere = () => fetch(`${second.url}/api/people`, { headers: { cookie } })
    expect((await elsewhere()).status).toBe(200)
    const out = await server.ask('POST', '/api/sign-out', { as: ctx, body: {} })
    expect(out.status).toBe(204)
    expect((await elsewhere()).status).toBe(401)
  })

  it('ends at once on every process when its person is taken out, and changes at once with their role', async () => {
    const second = await testServer()
    const { ctx, workshopId } = await testWorkshop()
    const { ctx: painter } = await testPerson({ workshopId, role: 'owner' })
    const invitations = () => second.ask('GET', '/api/invitations', { as: painter })
    expect((await invitations()).status).toBe(200)
    await server.ask('PATCH', `/api/people/${painter.personId}`, { as: ctx, body: { role: 'bench' } })
    expect((await invitations()).status).toBe(403)
    await server.ask('DELETE', `/api/people/${painter.personId}`, { as: ctx })
    expect((await invitations()).status).toBe(401)
  })

  it('is sealed: an id alone, or a seal of somebody else\'s, opens nothing', async () => {
    const { ctx } = await testWorkshop()
    const sealed = await cookieOf(ctx)
    const broken = `${sealed.slice(0, -3)}AAA`
    for (const cookie of [`countershade=${ctx.sessionId}`, broken]) {
      const response = await fetch(`${server.url}/api/session`, { headers: { cookie } })
      expect(await response.json()).toEqual({ session: null })
    }
  })

  it('has no door of the library\'s own', async () => {
    expect((await server.ask('GET', '/api/_auth/session')).status).toBe(404)
  })
})

describe('the answers', () => {
  it('to known and unknown addresses are the same', async () => {
    const { email } = await testWorkshop()
    for (const path of ['/api/sign-up', '/api/password/forgot']) {
      const [known, unknown] = await Promise.all([email, `x${email}`].map(async (address) => {
        const response = await server.ask('POST', path, { body: { email: address } })
        return { status: response.status, body: (await response.text()).replace(address, '…') }
      }))
      expect(known).toEqual(unknown)
      expect(known!.status).toBe(202)
    }
    const tries = await Promise.all([email, `x${email}`].map(async address =>
      (await server.ask('POST', '/api/sign-in', { body: { email: address, password: 'not it' } })).text()))
    expect(tries[0]).toBe(tries[1])
  })

  it('carry a policy without inline code, a nonce for our own, and no open door for other sites', async () => {
    const page = await server.ask('GET', '/sign-in')
    const policy = page.headers.get('content-security-policy') ?? ''
    expect(page.status).toBe(200)
    expect(policy).not.toContain('unsafe-inline')
    expect(policy).not.toContain('upgrade-insecure-requests')
    expect(policy).toMatch(/script-src [^;]*'nonce-[\w+/=]{20,}'/)
    expect(policy).toContain('frame-ancestors \'none\'')
    expect(page.headers.get('access-control-allow-origin')).toBeNull()
    expect(page.headers.get('strict-transport-security')).toBeNull()
    expect(page.headers.get('permissions-policy')).toContain('camera=(self)')
    for (const tag of (await page.text()).match(/<(?:script|style)\b[^>]*>/g) ?? []) expect(tag).toContain('nonce=')
    const data = await server.ask('GET', '/api/session')
    expect(data.headers.get('x-content-type-options')).toBe('nosniff')
  })

  it('of a server behind https hold browsers to https', async () => {
    const secure = await testServer({ PUBLIC_URL: 'https://bench.example' })
    const page = await secure.ask('GET', '/sign-in')
    expect(page.headers.get('strict-transport-security')).toContain('max-age=31536000')
    expect(page.headers.get('content-security-policy')).toContain('upgrade-insecure-requests')
  })
})

/** Sends a body in chunks without a length, and gives the status of the answer. */
function sentInPieces(url: string, bytes: number): Promise<number> {
  const { hostname, port, host, origin } = new URL(url)
  return new Promise((resolve, reject) => {
    const socket = connect(Number(port), hostname, () => {
      socket.write(`POST /api/sign-in HTTP/1.1\r\nhost: ${host}\r\norigin: ${origin}\r\ncontent-type: application/json\r\ntransfer-encoding: chunked\r\n\r\n`)
      const piece = 'x'.repeat(50_000)
      for (let sent = 0; sent < bytes && socket.writable; sent += piece.length) socket.write(`${piece.length.toString(16)}\r\n${piece}\r\n`)
    })
    let answer = ''
    socket.on('data', (chunk) => {
      answer += String(chunk)
      const status = /^HTTP\/1\.1 (\d{3})/.exec(answer)?.[1]
      if (status) {
        socket.destroy()
        resolve(Number(status))
      }
    })
    // The server may hang up while we still send: what it said before counts.
    socket.on('error', () => undefined)
    socket.on('close', () => reject(new Error(`No answer:\n${answer}`)))
  })
}
