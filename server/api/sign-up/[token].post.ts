import { database } from '#server/db/client'
import { answerSession } from '#server/http/answer-session'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody, parseParams } from '#server/http/parse'
import { visitorOf } from '#server/http/visitor'
import { LINKS_ADDRESS, countTry } from '#server/services/people/count-try'
import { signUp } from '#server/services/people/sign-up'
import { LinkParams } from '#shared/people/person'
import { SignUp } from '#shared/people/workshop'

export default defineApiHandler(async (event) => {
  const { token } = parseParams(event, LinkParams)
  const wanted = await parseBody(event, SignUp)
  const visitor = visitorOf(event)
  await countTry(database(), LINKS_ADDRESS, visitor.address)
  const session = await answerSession(event, await signUp(database(), token, wanted, visitor.device))
  setResponseStatus(event, 201)
  return session
})
