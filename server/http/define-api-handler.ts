import { type EventHandler, type EventHandlerRequest, type H3Event, defineEventHandler, isError, setResponseHeader } from 'h3'
import { answerProblem } from '#server/http/answer-problem'
import { Problem, type ProblemData } from '#shared/errors/problem'

/**
 * An API route: what the handler returns is the answer, a `Problem` it throws becomes a refusal, and anything else
 * it throws is our own failure, logged once and told to nobody.
 */
export function defineApiHandler<T>(handler: (event: H3Event) => Promise<T> | T): EventHandler<EventHandlerRequest, Promise<T>> {
  return defineEventHandler(async (event) => {
    // What a workshop reads is its own: no cache on the way keeps it unless the route says so.
    setResponseHeader(event, 'cache-control', 'no-store')
    try {
      return await handler(event)
    }
    catch (error) {
      await answerProblem(event, problemIn(event, error))
      return answered<T>()
    }
  })
}

function problemIn(event: H3Event, error: unknown): ProblemData {
  if (error instanceof Problem) return error.data
  if (isError(error) && error.statusCode === 404) return { code: 'request/not-found' }
  // A sender who hung up in the middle, as tablets do on a bad line, is no failure and gets no answer.
  if (!event.node.req.readableAborted) console.error(`${event.method} ${event.path.split('?')[0]} failed:`, error)
  return { code: 'server/failed' }
}

/** The answer is already on its way, and h3 asks for none: typed as the route's own answer, which a caller then never sees. */
function answered<T>(): T {
  return undefined as T
}
