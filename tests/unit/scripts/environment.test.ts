import { resolve } from 'node:path'
import { describe, expect, it } from 'vitest'
import { readPlace } from '../../../scripts/lib/environment.mjs'
import { readSettings } from '#server/settings'

const STORE = { S3_ENDPOINT: 'https://s3.example', S3_BUCKET: 'photos', S3_REGION: 'r', S3_ACCESS_KEY_ID: 'k', S3_SECRET_ACCESS_KEY: 's' }
const DATABASE = { DATABASE_URL: 'postgres://a@db/c', DATABASE_OWNER_URL: 'postgres://o@db/c', SESSION_PASSWORD: 'x'.repeat(32) }
const MAIL = { SMTP_URL: 'smtp://mail.example', MAIL_FROM: 'a@mail.example' }

describe('a start', () => {
  it('brings its own services when nothing is said', () => {
    expect(readPlace({})).toMatchObject({ port: 3000, host: '127.0.0.1', dataDir: resolve('.data'), publicUrl: 'http://127.0.0.1:3000' })
    expect(readPlace({}).outside).toEqual({ database: false, photos: false, mail: false })
  })

  it('announces the same defaults as the server has', () => {
    const { port, host, dataDir } = readPlace({})
    const settings = readSettings({ ...STORE, ...DATABASE, ...MAIL, PUBLIC_URL: 'http://127.0.0.1:3000' })
    expect({ port, host, dataDir }).toEqual({ port: settings.port, host: settings.host, dataDir: resolve(settings.dataDir) })
  })

  it('leaves alone what it is given from outside', () => {
    expect(readPlace({ ...STORE, ...DATABASE, ...MAIL }).outside).toEqual({ database: true, photos: true, mail: true })
  })

  it('takes an empty setting for none', () => {
    expect(readPlace({ PORT: '', DATABASE_URL: '', S3_BUCKET: '' }).outside.database).toBe(false)
  })

  it.each([
    [{ DATABASE_URL: DATABASE.DATABASE_URL }, 'DATABASE_OWNER_URL'],
    [{ ...DATABASE, SESSION_PASSWORD: '' }, 'SESSION_PASSWORD'],
    [{ ...STORE, S3_REGION: '' }, 'S3_REGION'],
    [{ SMTP_URL: MAIL.SMTP_URL }, 'MAIL_FROM'],
    [{ PORT: '0' }, 'PORT'],
    [{ PORT: 'http' }, 'PORT'],
  ])('refuses half of what belongs together and names the rest (%o)', (env, name) => {
    expect(() => readPlace(env)).toThrow(name)
  })

  it('makes links that a browser on this machine can follow', () => {
    expect(readPlace({ HOST: '0.0.0.0', PORT: '4000' }).publicUrl).toBe('http://127.0.0.1:4000')
    expect(readPlace({ HOST: '::1' }).publicUrl).toBe('http://[::1]:3000')
    expect(readPlace({ HOST: '0.0.0.0', PUBLIC_URL: 'https://workshop.example' }).publicUrl).toBe('https://workshop.example')
  })
})
