import { type H3Event, defineEventHandler, getRequestHeader, isMethod } from 'h3'
import { answerProblem } from '#server/http/answer-problem'
import { settings } from '#server/settings'

/** Nothing is changed by a request that a page of another site sent: whatever may change something must come from our own pages. */
export default defineEventHandler(async (event) => {
  if (isMethod(event, ['GET', 'HEAD', 'OPTIONS']) || comesFromOwnPage(event)) return
  await answerProblem(event, { code: 'request/forbidden-origin' })
})

function comesFromOwnPage(event: H3Event): boolean {
  const site = getRequestHeader(event, 'sec-fetch-site')
  if (site !== undefined) return site === 'same-origin'
  // Plain http on a local network: browsers leave Sec-Fetch-Site out there, and send Origin.
  const origin = getRequestHeader(event, 'origin')
  if (origin === undefined || !URL.canParse(origin)) return false
  return origin === new URL(settings().publicUrl).origin || new URL(origin).host === getRequestHeader(event, 'host')
}
