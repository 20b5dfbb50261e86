import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { Environment, readSettings } from '#server/settings'

const GOOD = {
  DATABASE_URL: 'postgres://countershade_app@127.0.0.1:5432/countershade',
  S3_ENDPOINT: 'http://127.0.0.1:9000',
  S3_BUCKET: 'countershade',
  S3_REGION: 'us-east-1',
  S3_ACCESS_KEY_ID: 'local',
  S3_SECRET_ACCESS_KEY: 'local-secret',
  SMTP_URL: 'smtp://127.0.0.1:2525',
  MAIL_FROM: 'Countershade <workshop@example.test>',
  PUBLIC_URL: 'http://127.0.0.1:3000/',
  SESSION_PASSWORD: 'x'.repeat(32),
}

describe('settings', () => {
  it('listens on loopback port 3000 when nothing else is said', () => {
    expect(readSettings(GOOD)).toMatchObject({ port: 3000, host: '127.0.0.1', dataDir: '.data' })
  })

  it('makes links without a doubled slash', () => {
    expect(readSettings(GOOD).publicUrl).toBe('http://127.0.0.1:3000')
  })

  it('cannot be changed after they are read', () => {
    const settings = readSettings(GOOD)
    expect(Object.isFrozen(settings) && Object.isFrozen(settings.photos) && Object.isFrozen(settings.mail)).toBe(true)
  })

  it.each([
    ['PORT', '70000'],
    ['PORT', 'three'],
    ['DATABASE_URL', 'mysql://db/countershade'],
    ['S3_ENDPOINT', 'photos'],
    ['S3_BUCKET', 'Not A Bucket'],
    ['SMTP_URL', 'http://mail.example'],
    ['MAIL_FROM', 'nobody'],
    ['MAIL_FROM', 'a@b.example\r\nBcc: c@d.example'],
    ['PUBLIC_URL', 'workshop.example'],
    ['SESSION_PASSWORD', 'short'],
  ])('refuse %s=%s and say which setting is wrong', (name, value) => {
    expect(() => readSettings({ ...GOOD, [name]: value })).toThrow(new RegExp(`Wrong settings:[^]*${name}`))
  })

  it('never show a secret when it is wrong', () => {
    expect(() => readSettings({ ...GOOD, SESSION_PASSWORD: 'hunter2' })).toThrow(/^(?![^]*hunter2)/)
  })

  it('are all listed in .env.example, and nothing else is', () => {
    const example = readFileSync('.env.example', 'utf8')
    const listed = [...example.matchAll(/^#?([A-Z][A-Z0-9_]+)=/gm)].map(match => match[1])
    // The tables' owner is known to the start script only: the server never holds that key.
    expect(listed.toSorted()).toEqual([...Object.keys(Environment.shape), 'DATABASE_OWNER_URL'].toSorted())
  })

  it('give the server the defaults the start script announces', () => {
    const example = readFileSync('.env.example', 'utf8')
    const settings = readSettings(GOOD)
    expect(example).toContain(`#PORT=${settings.port}\n#HOST=${settings.host}\n`)
    expect(example).toContain(`#DATA_DIR=${settings.dataDir}\n`)
  })
})
