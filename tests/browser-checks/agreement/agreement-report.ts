import type { EngineName, PictureEngine } from '#shared/picture/engine/picture-engine'
import { demoWall } from '../../fixtures/demo-looks'
import { differenceOf, joined, type Difference } from './compare-light'
import { demoPictures } from './demo-pictures'
import { doubleLight } from './double-light'
import { randomStacks, type Asked } from './random-stacks'

/** How well one engine agrees with double precision, and how long it took. */
export interface EngineReport {
  engine: EngineName
  stacks: Difference
  finishes: Record<string, Difference>
  /** Milliseconds for all pictures of the demo wall. */
  ms: number
}

/** Every engine against the same pictures, each worked out once in double precision. */
export function agreementOf(engines: readonly PictureEngine[]): EngineReport[] {
  const reports = engines.map((engine): EngineReport => ({ engine: engine.name, stacks: { samples: 0, most: 0, mean: 0 }, finishes: {}, ms: 0 }))
  const compared = (asks: Iterable<Asked>): Difference[] => {
    const all = engines.map((): Difference[] => [])
    for (const { kit, ask } of asks) {
      const right = doubleLight(ask)
      engines.forEach((engine, e) => {
        const since = performance.now()
        const light = engine.light(kit, ask)
        reports[e]!.ms += performance.now() - since
        all[e]!.push(differenceOf(light, right))
      })
    }
    return all.map(joined)
  }
  compared(randomStacks()).forEach((difference, e) => reports[e]!.stacks = difference)
  for (const report of reports) report.ms = 0
  for (const name of demoWall.keys()) compared(demoPictures(name)).forEach((difference, e) => reports[e]!.finishes[name] = difference)
  return reports
}
