import type { SchemeBody } from './body'
import { type Coat, GIRTH_ZONES, type Gun, LENGTH_ZONES, type Mix, type Tool, type Where } from './coat'
import type { Mark } from './mark'
import type { Materials } from './materials'
import { brackets, coatNumber } from './stack-order'

/** Words one after another: "a", "a and b", "a, b and c". */
export function listWords(words: readonly string[]): string {
  const last = words.at(-1)
  return last === undefined ? '' : words.length === 1 ? last : `${words.slice(0, -1).join(', ')} and ${last}`
}

/** A count with its noun: "1 pass", "3 passes". */
export function countWords(count: number, one: string, many = `${one}s`): string {
  return `${count} ${count === 1 ? one : many}`
}

/** A figure without needless decimals. */
function figure(value: number, decimals = 1): string {
  return String(Number(value.toFixed(decimals)))
}

/** What a paint is called; one the materials do not know is said to be gone. */
export function paintWord(paintId: string, materials: Pick<Materials, 'paints'>): string {
  return materials.paints.find(paint => paint.id === paintId)?.name ?? 'a paint that is gone'
}

/** What is in the cup: "20 drops Opaque white, 6 drops reducer". */
export function mixWords(mix: Mix, materials: Pick<Materials, 'paints'>): string {
  if (mix.parts.length === 0) return 'no paint yet'
  const parts = mix.parts.map(part => `${countWords(part.drops, 'drop')} ${paintWord(part.paintId, materials)}`)
  return [...parts, ...mix.reducer > 0 ? [`${countWords(mix.reducer, 'drop')} reducer`] : []].join(', ')
}

/** With what a coat is laid: "airbrush 0.3 mm, 1.1 bar, 8 cm". */
export function toolWords(tool: Tool): string {
  switch (tool.kind) {
    case 'airbrush': return `airbrush ${figure(tool.nozzle, 2)} mm, ${figure(tool.pressure, 2)} bar, ${figure(tool.distance)} cm`
    case 'brush': return 'brush'
    case 'sponge': return 'sponge'
    case 'dip': return 'dipped'
  }
}

/** Where the airbrush stands: "from above, 15°". */
export function gunWords(gun: Gun): string {
  if (gun.aim === 'all over') return 'from all round'
  const from = gun.angle < 35 ? 'from above' : gun.angle < 70 ? 'from the shoulder' : gun.angle <= 110 ? 'level with the flank' : gun.angle <= 145 ? 'from below the flank' : 'from below'
  const width = gun.footprint < 0.6 ? ', a narrow line' : gun.footprint > 1.5 ? ', flooding' : ''
  return `${from}, ${figure(gun.angle, 0)}°${width}`
}

function finWords(fins: Where['fins']): string {
  return listWords(fins.map(({ fin, root, tip, on }) => {
    const name = fin === 'all' ? 'all fins' : `${fin.replaceAll('-', ' ')} fin`
    const part = on === 'whole' ? '' : ` (${on})`
    const fade = root === tip ? '' : root > tip ? ', fading to the tip' : ', fading to the root'
    return `${name}${part}${fade}`
  }))
}

function zoneWords({ zones }: Where): string {
  const girth = GIRTH_ZONES.filter(zone => zones.includes(zone))
  const length = LENGTH_ZONES.filter(zone => zones.includes(zone))
  if (girth.length === 0 && length.length === 0) return 'the whole body'
  if (girth.length === 0) return listWords(length)
  return length.length === 0 ? listWords(girth) : `${listWords(girth)} of the ${listWords(length)}`
}

function edgeWords({ zones, reach, edge, fade, along }: Where): string[] {
  const limits = along ? [`from ${figure(along.from * 100, 0)} to ${figure(along.to * 100, 0)} % of the length`] : []
  if (zones.length === 0) return limits
  const past = reach === 0 ? [] : [reach > 0 ? `${figure(reach)} mm past the edge` : `${figure(-reach)} mm short of the edge`]
  const soft = edge === 'hard' ? 'hard edge' : fade === undefined ? 'fading edge' : `fading over ${figure(fade)} mm`
  return [...limits, ...past, soft]
}

/** Where a coat lies: "back and upper flank, 3 mm past the edge, fading edge; dorsal fin". */
export function whereWords(where: Where): string {
  const body = where.body ? [zoneWords(where), ...edgeWords(where)].join(', ') : ''
  return [body, finWords(where.fins)].filter(words => words !== '').join('; ') || 'nowhere'
}

function markWord(mark: Mark): string {
  const word = markFormWord(mark)
  return 'only' in mark && mark.only ? `${word} on the ${mark.only} side only` : word
}

function markFormWord(mark: Mark): string {
  switch (mark.kind) {
    case 'strokes': return `${countWords(mark.strokes.length, 'stroke')} by ${mark.with}`
    case 'fan': return `a fan of ${countWords(mark.count, 'ray')}`
    case 'dots': return countWords(mark.dots.length, 'dot')
    case 'scatter': return `${countWords(mark.count, 'scattered dot')}`
    case 'outline': return 'a filled outline'
    case 'worm tracks': return 'worm tracks'
    case 'torn sponge': return 'torn sponge'
  }
}

/** What is drawn by hand: "3 strokes by airbrush and 12 dots"; empty when nothing is. */
export function marksWords(marks: readonly Mark[]): string {
  const counts = new Map<string, number>()
  for (const mark of marks) counts.set(markWord(mark), (counts.get(markWord(mark)) ?? 0) + 1)
  return listWords([...counts].map(([word, count]) => count === 1 ? word : `${count} times ${word}`))
}

/** How long it waits: "rests 5 min", "rests 1 h 30 min, heat-set 60 s". */
export function restWords({ rest, heatSet }: Pick<Coat, 'rest' | 'heatSet'>): string {
  const hours = Math.floor(rest / 60)
  const minutes = figure(rest - hours * 60)
  const wait = rest === 0 ? 'no rest' : `rests ${[...hours > 0 ? [`${hours} h`] : [], ...minutes !== '0' ? [`${minutes} min`] : []].join(' ')}`
  return heatSet ? `${wait}, heat-set ${figure(heatSet.seconds, 0)} s at ${figure(heatSet.distance, 0)} cm` : wait
}

/** Through what a coat is laid: "through “Bars”, fitted before 9, lifted after 10"; empty without a mask. */
export function masksWords(body: Pick<SchemeBody, 'stack' | 'masks'>, coatId: string): string {
  const over = brackets(body).filter(bracket => bracket.coatIds.includes(coatId))
  return over.map(({ mask, coatIds }) => {
    const [first, last] = [coatIds[0], coatIds.at(-1)].map(id => coatNumber(body.stack, id ?? ''))
    const through = mask.form.kind !== 'mesh' && mask.form.does === 'shields' ? 'past' : 'through'
    return `${through} “${mask.name}”, fitted before ${first}, lifted after ${last}`
  }).join('; ')
}

/** One line on a coat: "3 passes on the back, fading edge, through “Bars”, fitted before 9, lifted after 10". */
export function coatLine(body: Pick<SchemeBody, 'stack' | 'masks'>, coat: Coat): string {
  const where = coat.marks.length > 0 ? `${marksWords(coat.marks)}` : `on ${whereWords(coat.where)}`
  const masks = masksWords(body, coat.id)
  return `${countWords(coat.passes, 'pass', 'passes')} ${where}${masks === '' ? '' : `, ${masks}`}`
}

/** Where a coat lies in its stack, as a screen reader says it after a move: "coat 5 of 12, through “Fine net”". */
export function placeWords(body: Pick<SchemeBody, 'stack' | 'masks'>, coatId: string): string {
  const count = body.stack.filter(item => item.act === 'coat').length
  const over = brackets(body).filter(bracket => bracket.coatIds.includes(coatId)).map(bracket => `“${bracket.mask.name}”`)
  return `coat ${coatNumber(body.stack, coatId)} of ${count}${over.length > 0 ? `, under ${listWords(over)}` : ''}`
}
