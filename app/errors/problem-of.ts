import { Problem, ProblemData } from '#shared/errors/problem'

/** The refusal inside an error, ours or one that came back from the server; null for anything else. */
export function problemOf(error: unknown): ProblemData | null {
  if (error instanceof Problem) return error.data
  for (const data of [dataOf(error), dataOf(dataOf(error))]) {
    const parsed = ProblemData.safeParse(data)
    if (parsed.success) return parsed.data
  }
  return null
}

/** What is wrong with each field of a form, by its path; empty when that was not the trouble. */
export function fieldsOf(error: unknown): Readonly<Record<string, string>> {
  const problem = problemOf(error)
  return problem?.code === 'input/invalid'
    ? Object.fromEntries(problem.fields.map(field => [field.path, field.message]))
    : {}
}

/** Errors carry the answer's body in `data`; an error that passed through a page's data carries it one deeper. */
function dataOf(error: unknown): unknown {
  return typeof error === 'object' && error !== null && 'data' in error ? error.data : undefined
}
