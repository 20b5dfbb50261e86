import { type H3Event, removeResponseHeader, send, setResponseHeader, setResponseStatus } from 'h3'
import { STATUS } from '#server/http/status'
import type { ProblemData } from '#shared/errors/problem'

const TITLE: Readonly<Record<number, string>> = {
  401: 'Not signed in',
  403: 'Not allowed',
  404: 'Not found',
  409: 'In conflict with what is there',
  410: 'No longer there',
  412: 'Changed meanwhile',
  413: 'Too large',
  415: 'Not a kind that is taken',
  422: 'Not understood',
  428: 'A condition is missing',
  429: 'Too many tries',
  500: 'Our side failed',
}

/** Answers with a refusal as RFC 9457 describes it: status, title and type for any client, code and details for ours. */
export async function answerProblem(event: H3Event, problem: ProblemData): Promise<void> {
  const status = STATUS[problem.code]
  const title = TITLE[status] ?? 'Refused'
  setResponseStatus(event, status, title)
  setResponseHeader(event, 'cache-control', 'no-store')
  removeResponseHeader(event, 'etag')
  if ('retryAfterSeconds' in problem) setResponseHeader(event, 'retry-after', problem.retryAfterSeconds)
  const body = { type: `urn:countershade:problem:${problem.code.replace('/', ':')}`, title, status, ...problem }
  await send(event, JSON.stringify(body), 'application/problem+json')
}
