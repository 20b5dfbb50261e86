// Measures how fast pictures are painted and prints it; with --write it becomes docs/bench.md.
import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { ROOT } from './lib/environment.mjs'
import { importTypeScript } from './lib/type-script.mjs'

const { benchReport } = /** @type {typeof import('./bench/bench-report')} */ (await importTypeScript('scripts/bench/bench-report.ts'))
const report = await benchReport(ROOT, new Date().toISOString().slice(0, 10))
process.stdout.write(report)
if (process.argv.includes('--write')) writeFileSync(join(ROOT, 'docs/bench.md'), report)
