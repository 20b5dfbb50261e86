import { database } from '#server/db/client'
import { answerSession } from '#server/http/answer-session'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody } from '#server/http/parse'
import { visitorOf } from '#server/http/visitor'
import { signIn } from '#server/services/people/sign-in'
import { SignIn } from '#shared/people/person'

export default defineApiHandler(async (event) => {
  const tried = await parseBody(event, SignIn)
  return answerSession(event, await signIn(database(), tried, visitorOf(event)))
})
