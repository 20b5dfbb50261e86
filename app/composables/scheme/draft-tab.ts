/** Where a tab remembers its own name through a reload. */
const TAB = 'countershade:tab'
const lockOf = (tab: string) => `countershade-tab ${tab}`

/** A tab by a name of its own, and how it tells whether another tab is open. */
export interface DraftTab {
  name: string
  /** Whether a tab of that name is open somewhere in this browser. */
  isOpen: (name: string) => Promise<boolean>
}

/** Holds a name for as long as the page lives; false when another page holds it. */
async function hold(name: string): Promise<boolean> {
  return new Promise((resolve, reject) => {
    void navigator.locks.request(lockOf(name), { ifAvailable: true }, (lock) => {
      resolve(lock !== null)
      // Never settles: the browser lets go of it when the page ends, however it ends.
      return lock && new Promise<never>(() => undefined)
    }).catch(reject)
  })
}

/** After a reload the page before may take a moment to let go of its name. */
const lettingGo = () => new Promise<void>((resolve) => {
  window.setTimeout(resolve, 200)
})

let claimed: Promise<DraftTab> | undefined

/**
 * This tab, claimed once a page: the same name after a reload, another in a tab that was made by copying this one. Where the
 * browser has no locks a name is taken on trust, and no other tab counts as open.
 */
export function thisTab(): Promise<DraftTab> {
  claimed ??= claimTab()
  return claimed
}

async function claimTab(): Promise<DraftTab> {
  const remembered = readName()
  if (!('locks' in navigator)) return { name: remembered ?? rename(), isOpen: async () => false }
  const isOpen = async (name: string) => {
    const { held = [] } = await navigator.locks.query()
    return held.some(lock => lock.name === lockOf(name))
  }
  if (remembered !== null && (await hold(remembered) || (await lettingGo(), await hold(remembered)))) return { name: remembered, isOpen }
  const name = rename()
  await hold(name)
  return { name, isOpen }
}

function readName(): string | null {
  try {
    return window.sessionStorage.getItem(TAB)
  }
  catch {
    return null
  }
}

function rename(): string {
  const name = crypto.randomUUID()
  try {
    window.sessionStorage.setItem(TAB, name)
  }
  catch {
    // Without a memory of its own the tab has another name after a reload; what it kept is found as that of a tab that is gone.
  }
  return name
}
