/** Things in the order their ids are wished for; ids that are not among them are left out, things nobody named follow as they stood. */
export function orderAsWished<T extends { readonly id: string }>(standing: readonly T[], wish: readonly string[]): T[] {
  const byId = new Map(standing.map(thing => [thing.id, thing]))
  const named = [...new Set(wish)].flatMap(id => byId.get(id) ?? [])
  const taken = new Set(named.map(thing => thing.id))
  return [...named, ...standing.filter(thing => !taken.has(thing.id))]
}
