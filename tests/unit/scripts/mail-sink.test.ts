import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startMailSink, subjectOf } from '../../../scripts/mail-sink'
import type { MailSink, SunkMail } from '../../../scripts/mail-sink'
import { openMailTransport } from '#server/mail/transport'

let folder: string
let sink: MailSink
const told: SunkMail[] = []
beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'mail-'))
  sink = await startMailSink(folder, mail => told.push(mail))
})
afterAll(async () => {
  await sink.close()
  rmSync(folder, { recursive: true })
})

const index = () => JSON.parse(readFileSync(join(folder, 'index.json'), 'utf8')) as SunkMail[]

describe('mail of a local workshop', () => {
  it('lies in a file, is listed, and is told', async () => {
    const transport = openMailTransport({ url: sink.url, from: 'Countershade <workshop@bench.example>' })
    const subject = 'Your sample of “Döbel, Abendlicht” is ready — in a longer subject that does not fit one line'
    await transport.send({ to: 'customer@bench.example', subject, text: 'Say yes here.', messageId: '<one@bench.example>' })
    transport.close()
    const [mail] = index()
    expect(mail).toMatchObject({ from: 'workshop@bench.example', to: ['customer@bench.example'], subject })
    expect(told).toEqual([mail])
    expect(readFileSync(join(folder, mail?.file ?? ''), 'utf8')).toContain('Say yes here.')
  })

  it('is all there when many letters come at once', async () => {
    const transport = openMailTransport({ url: sink.url, from: 'workshop@bench.example' })
    const before = index().length
    await Promise.all(Array.from({ length: 12 }, (_, n) => transport.send({ to: `c${n}@bench.example`, subject: `${n}`, text: 'x' })))
    transport.close()
    expect(new Set(index().slice(before).map(mail => mail.subject)).size).toBe(12)
  })

  it('reads as people wrote it', () => {
    expect(subjectOf('To: a\r\nSubject: =?UTF-8?Q?gr=C3=BCner?=\r\n =?UTF-8?B?IEhlY2h0?=\r\n\r\nSubject: no')).toBe('grüner Hecht')
  })
})
