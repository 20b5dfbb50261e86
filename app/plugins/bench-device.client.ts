import { fetchActs, sendActs, setbackOf } from '~/composables/bench/bench-link'
import { useBenchClock } from '~/composables/bench/use-bench-clock'
import { useSession } from '~/composables/people/use-session'
import { createActKeeper } from '~/bench/act-keeper'
import { actBox } from '~/bench/device/act-box'
import { keepAppHere } from '~/bench/device/app-worker'
import { benchDevice, type Owner } from '~/bench/device/bench-device'

/** A page of the bench, which keeps and hands over by itself. */
const BENCH_PAGE = /\/follow\/?$/

/** Keeps the application on this device, and hands over from any page what still waits from the bench. */
export default defineNuxtPlugin({
  name: 'bench-device',
  setup(nuxtApp) {
    const { session } = useSession()
    nuxtApp.hook('app:mounted', () => {
      const isBenchPage = BENCH_PAGE.test(window.location.pathname)
      // A browser that keeps no application still shows every page.
      if (!import.meta.dev) keepAppHere(isBenchPage).catch(() => undefined)
      const { person, workshop } = session.value ?? {}
      if (!isBenchPage && person && workshop) handOver({ personId: person.id, workshopId: workshop.id }).catch(() => undefined)
    })
  },
})

async function handOver(owner: Owner): Promise<void> {
  const box = actBox(benchDevice, owner)
  const [first] = await box.waiting()
  if (!first) return
  const clock = useBenchClock()
  const asked = Date.now()
  // Times are told by the bench's clock, which is set by the server's first.
  clock.heard((await fetchActs(first.runId, 0)).now, asked, Date.now())
  const keeper = createActKeeper(box, {
    send: (runId, events) => sendActs(runId, events, clock.read()),
    setback: setbackOf,
    onAnswers: () => undefined,
    onChange: () => undefined,
    later: (ms, work) => {
      const timer = window.setTimeout(work, ms)
      return () => window.clearTimeout(timer)
    },
  })
  await keeper.flush()
}
