import { defineApiHandler } from '#server/http/define-api-handler'
import { Problem } from '#shared/errors/problem'

/** Whatever is no route of ours is refused like everything else. */
export default defineApiHandler<null>(() => {
  throw new Problem({ code: 'request/not-found' })
})
