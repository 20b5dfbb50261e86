import { database } from '#server/db/client'
import { afterAnswer } from '#server/http/after-answer'
import { defineApiHandler } from '#server/http/define-api-handler'
import { parseBody } from '#server/http/parse'
import { visitorOf } from '#server/http/visitor'
import { LETTERS_ADDRESS, LETTERS_MAILBOX, countTry } from '#server/services/people/count-try'
import { requestSignUp } from '#server/services/people/request-sign-up'
import { LetterRequest } from '#shared/people/person'

export default defineApiHandler(async (event) => {
  const { email } = await parseBody(event, LetterRequest)
  await countTry(database(), LETTERS_ADDRESS, visitorOf(event).address)
  await countTry(database(), LETTERS_MAILBOX, email)
  afterAnswer(event, requestSignUp(database(), email))
  setResponseStatus(event, 202)
  return { sentTo: email }
})
