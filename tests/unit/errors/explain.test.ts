import { expect, it } from 'vitest'
import { explain } from '~/errors/explain'
import { fieldsOf, problemOf } from '~/errors/problem-of'
import { sentence } from '~/errors/sentence'
import { Problem, ProblemData } from '#shared/errors/problem'

const fetchError = (data: unknown, statusCode?: number) => Object.assign(new Error('fetch'), { name: 'FetchError', data, ...(statusCode ? { statusCode } : {}) })

it('finds the refusal in an answer, in a page\'s error and in one of our own', () => {
  const answer = { type: 'urn:x', title: 'Not found', status: 404, code: 'scheme/not-found' }
  const found = { code: 'scheme/not-found' }
  expect(problemOf(fetchError(answer, 404))).toEqual(found)
  expect(problemOf({ data: { data: answer } })).toEqual(found)
  expect(problemOf(new Problem({ code: 'scheme/not-found' }))).toEqual(found)
})

it('takes nothing else for a refusal', () => {
  for (const error of [null, undefined, 'scheme/not-found', new Error('x'), fetchError({ code: 'made/up' }, 400)]) expect(problemOf(error)).toBeNull()
})

it('tells a line that is down from a server that failed', () => {
  expect(explain(fetchError(undefined))).toContain('no connection')
  expect(explain(fetchError('<html>', 502))).toContain('our side')
  expect(explain(new Error('x'))).toContain('our side')
})

it('says what is wrong with each field', () => {
  const error = fetchError({ code: 'input/invalid', fields: [{ path: 'email', message: 'No address.' }] }, 422)
  expect(fieldsOf(error)).toEqual({ email: 'No address.' })
  expect(fieldsOf(fetchError({ code: 'scheme/not-found' }, 404))).toEqual({})
})

it('says every refusal in whole sentences, without a code in them', () => {
  const filled = { action: 'x', retryAfterSeconds: 600, fields: [], reason: 'It is so.', reasons: ['It is so.'], version: 2, maxBytes: 1e7, maxPixels: 4e7, max: 12 }
  for (const option of ProblemData.options) {
    const code = [...option.shape.code.values][0]!
    const said = sentence(ProblemData.parse({ ...filled, code }))
    expect(said, code).toMatch(/^[A-Z].*[.]$/s)
    expect(said).not.toContain(code)
  }
})
