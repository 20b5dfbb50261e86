import { writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { opticsPictures } from './lib/optics-pictures'
import { opticsPlots } from './lib/optics-plots'

/**
 * Draws every plot and painted picture of docs/optics.md from the code into a folder.
 *
 * @returns the names of the files
 */
export async function drawPlots(folder: string): Promise<string[]> {
  const files = Object.entries({ ...opticsPlots(), ...await opticsPictures() })
  await Promise.all(files.map(([name, content]) => writeFile(join(folder, name), content)))
  return files.map(([name]) => name)
}
