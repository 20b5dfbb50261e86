// Draws the plots of docs/optics.md anew, from the code as it is: node scripts/plots.mjs
import { join } from 'node:path'
import { ROOT } from './lib/environment.mjs'
import { importTypeScript } from './lib/type-script.mjs'

const { drawPlots } = /** @type {typeof import('./plots.ts')} */ (await importTypeScript('scripts/plots.ts'))
for (const name of await drawPlots(join(ROOT, 'docs/pictures'))) console.log(`docs/pictures/${name}`)
