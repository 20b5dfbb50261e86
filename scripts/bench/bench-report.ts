import { cpus, hostname, loadavg } from 'node:os'
import { bundleSizes, chromiumFigures, type ChromiumFigures, type BundleSize } from './chromium-figures'
import { nodeFigures, type Line, type NodeFigures } from './node-figures'

/** What the speed of painting is held to. */
const LINES = {
  simdToExact: 25, libraryToSimd: 100, fit: 0.95, evenShare: 1.15, firstMs: 50, wholeMs: 250, pageMs: 4, taskMs: 50, engineBytes: 60_000,
}

interface Held { what: string, figure: string, line: string, isMet: boolean }

/** Measures everything and says it in one page of Markdown, with the lines it is held to and whether each is met. */
export async function benchReport(root: string, today: string): Promise<string> {
  const load = loadavg()[0]!
  const node = nodeFigures()
  const sizes = await bundleSizes(root)
  const chromium = await chromiumFigures(root)
  return [
    '# How fast pictures are painted',
    '',
    `Written by \`npm run bench -- --write\` on ${today}, ${hostname()}, ${cpus().length} × ${cpus()[0]?.model ?? 'unknown'}, Node ${process.version}, ${chromium.browser} with software graphics.`,
    `Other work on the machine at the start: a load of ${load.toFixed(1)} on ${cpus().length} cores.`,
    'Ratios are of processor time within this one run. Times in the browser are times on the wall, and grow with whatever else the machine does.',
    '',
    '## The lines, and whether they are met',
    '',
    ...table(['what', 'here', 'line', 'met'], heldTo(node, chromium, sizes).map(({ what, figure, line, isMet }) => [what, figure, line, isMet ? 'yes' : '**no**'])),
    '',
    ...stackPart(node),
    ...browserPart(chromium),
    '## Download',
    '',
    ...table(['what', 'raw', 'gzip', 'brotli'], sizes.map(({ what, raw, gzip, brotli }) => [what, kB(raw), kB(gzip), kB(brotli)])),
    '',
  ].join('\n')
}

function heldTo(node: NodeFigures, { pages, requests, pageCpu }: ChromiumFigures, sizes: readonly BundleSize[]): Held[] {
  const ms = (way: string) => node.ways.find(each => each.way === way)!.ms
  const simd = ms('WebAssembly SIMD'), edits = pages.flatMap(page => page.edits)
  const p95 = (of: 'page' | 'first' | 'whole') => quantile(edits.map(edit => edit[of]), 0.95)
  const cpu95 = (of: 'first' | 'whole') => quantile(node.edits.flatMap(({ simd: each }) => each[of]), 0.95)
  const least = (what: string, figure: number, line: number, unit: string): Held => ({ what, figure: `${figure.toFixed(figure < 10 ? 2 : 0)}${unit}`, line: `≥ ${line}${unit}`, isMet: figure >= line })
  const most = (what: string, figure: number, line: number, unit: string): Held => ({ what, figure: `${figure.toFixed(figure < 10 ? 1 : 0)}${unit}`, line: `≤ ${line}${unit}`, isMet: figure <= line })
  return [
    least('SIMD against the exact formula at every pixel', ms('exact, every pixel') / simd, LINES.simdToExact, ' ×'),
    least('SIMD against spectral.js', ms('spectral.js') / simd, LINES.libraryToSimd, ' ×'),
    least('SIMD against culori', ms('culori, Oklab') / simd, LINES.libraryToSimd, ' ×'),
    most(`${node.even.coats} even coats against none`, node.even.ms / node.even.none, LINES.evenShare, ' ×'),
    least('straight line in coats, R²', node.byCoats.r2, LINES.fit, ''),
    least('straight line in pixels, R²', node.byPixels.r2, LINES.fit, ''),
    most('edit to first picture, p95, processor time in Node', cpu95('first'), LINES.firstMs, ' ms'),
    most('edit to whole picture, p95, processor time in Node', cpu95('whole'), LINES.wholeMs, ' ms'),
    most('edit to first picture, p95, on the wall in Chromium', p95('first'), LINES.firstMs, ' ms'),
    most('edit to whole picture, p95, on the wall in Chromium', p95('whole'), LINES.wholeMs, ' ms'),
    most('the page’s own work for a change, mean, processor time in Chromium', pageCpu, LINES.pageMs, ' ms'),
    most('the page’s own work for an edit, p95, on the wall in Chromium', p95('page'), LINES.pageMs, ' ms'),
    most('longest task while a coat is dragged', Math.max(...pages.map(page => page.drag.longest)), LINES.taskMs, ' ms'),
    most('requests while a coat is dragged', requests, 0, ''),
    { what: 'everything that paints, brotli', figure: kB(sizes[1]!.brotli), line: `≤ ${kB(LINES.engineBytes)}`, isMet: sizes[1]!.brotli <= LINES.engineBytes },
  ]
}

function stackPart({ task, ways, apart, byCoats, byPixels, even, edits, find }: NodeFigures): string[] {
  const simd = ways.find(({ way }) => way === 'WebAssembly SIMD')!.ms
  return [
    '## One stack, six ways',
    '',
    `${task.width} × ${task.height} pixels, ${task.coats} coats that all vary from pixel to pixel, 16 bands, to linear red, green and blue. The vector engine also bends`,
    'its light for the screen and keeps nothing from before. Libraries that mix colours lay each coat over the last by its share, as far as a',
    `library of colours can; they are given one pixel in 64 and their time is counted 64 times. The vector engine and the exact way are at most ΔE00 ${apart.toFixed(3)} apart.`,
    '',
    ...table(['way', 'ms of the processor', 'times SIMD'], ways.map(({ way, ms }) => [way, ms.toFixed(0), (ms / simd).toFixed(1)])),
    '',
    `It grows in a straight line: ${fit(byCoats, 'a coat')} and ${fit(byPixels, 'a thousand pixels')}.`,
    `${even.coats} coats that lie evenly take ${even.ms.toFixed(1)} ms, none ${even.none.toFixed(1)} ms.`,
    '',
    '## An edit of a whole picture',
    '',
    'Each coat of a finish edited four times, its passes or its place, 640 × 320: from the look to the pixels, median / 95 in 100, ms of the processor.',
    '',
    ...table(['finish', 'plain: first', 'plain: whole', 'SIMD: first', 'SIMD: whole'], edits.map(({ plain, simd: vectors }) => [
      plain.finish, ...[plain.first, plain.whole, vectors.first, vectors.whole].map(spread),
    ])),
    '',
    '## Looking for a coat',
    '',
    ...table(['what', 'ms'], find.map(({ what, ms }) => [what, ms.toFixed(0)])),
    '',
  ]
}

function browserPart({ pages }: ChromiumFigures): string[] {
  return [
    '## In Chromium',
    '',
    'Each coat of a finish edited three times, its passes or its place, 640 × 320; median and 95 in 100, ms from the edit until it is drawn. Then a coat dragged for three seconds.',
    '',
    ...table(['finish', 'page', 'first picture', 'whole picture', 'tasks over 50 ms in a drag', 'pictures in a drag'], pages.map(({ finish, edits, drag }) => [
      finish, spread(edits.map(({ page }) => page)), spread(edits.map(({ first }) => first)), spread(edits.map(({ whole }) => whole)), `${drag.long}`, `${drag.pictures} of ${drag.changes} changes`,
    ])),
    '',
  ]
}

function fit({ per, rest, r2 }: Line, what: string): string {
  return `${per.toFixed(2)} ms for ${what} and ${rest.toFixed(1)} ms besides, R² ${r2.toFixed(3)}`
}

function table(head: readonly string[], rows: readonly (readonly string[])[]): string[] {
  const line = (cells: readonly string[]) => `| ${cells.map(cell => cell.trim()).join(' | ')} |`
  return [line(head), `|${'---|'.repeat(head.length)}`, ...rows.map(line)]
}

const spread = (values: readonly number[]) => `${quantile(values, 0.5).toFixed(0)} / ${quantile(values, 0.95).toFixed(0)}`

const kB = (bytes: number) => `${(bytes / 1000).toFixed(1)} kB`

function quantile(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b)
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? NaN
}
