import { writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { opticsPlots } from './lib/optics-plots'

/**
 * Draws every plot of the docs from the code into a folder.
 *
 * @returns the names of the files
 */
export async function drawPlots(folder: string): Promise<string[]> {
  const plots = Object.entries(opticsPlots())
  await Promise.all(plots.map(([name, text]) => writeFile(join(folder, name), text)))
  return plots.map(([name]) => name)
}
