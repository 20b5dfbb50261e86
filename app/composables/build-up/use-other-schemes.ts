import { api } from '~/composables/api/api'

/** Reads the names of every other scheme of the workshop, newest work first; throws when they cannot be read. */
export function useOtherSchemes(ownId: string): () => Promise<{ value: string, label: string }[]> {
  return async () => {
    const all: { value: string, label: string }[] = []
    let after: string | null = null
    do {
      const page: { items: readonly { id: string, name: string }[], next: string | null } = await api('/api/schemes', { query: { limit: 60, ...after ? { after } : {} } })
      all.push(...page.items.map(({ id, name }) => ({ value: id, label: name })))
      after = page.next
    } while (after)
    return all.filter(({ value }) => value !== ownId)
  }
}
