import { computed, type ComputedRef, ref, watch } from 'vue'

/** Choosing several of a list, in the order the list shows them. */
export function useChosen(ids: ComputedRef<readonly string[]>) {
  const isChoosing = ref(false)
  const chosen = ref<ReadonlySet<string>>(new Set())
  /** The one that was turned last: a range goes from it. */
  const last = ref<string | null>(null)

  // What is no longer shown is not acted on unseen.
  watch(ids, (shown) => {
    const kept = shown.filter(id => chosen.value.has(id))
    if (kept.length !== chosen.value.size) chosen.value = new Set(kept)
  })

  /** Turns one in or out; with `asRange` everything from the last one to it becomes as it does. */
  function turn(id: string, asRange = false) {
    const isIn = !chosen.value.has(id)
    const [from, to] = [asRange && last.value ? ids.value.indexOf(last.value) : -1, ids.value.indexOf(id)].sort((one, other) => one - other) as [number, number]
    const turned = from < 0 ? [id] : ids.value.slice(from, to + 1)
    const next = new Set(chosen.value)
    for (const each of turned) {
      if (isIn) next.add(each)
      else next.delete(each)
    }
    chosen.value = next
    last.value = id
  }

  function begin() {
    isChoosing.value = true
  }
  function leave() {
    isChoosing.value = false
    chosen.value = new Set()
    last.value = null
  }
  return { isChoosing, chosen, count: computed(() => chosen.value.size), turn, begin, leave }
}
