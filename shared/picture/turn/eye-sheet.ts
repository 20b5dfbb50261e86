import { newCanvas } from '../canvas'
import { drawEye } from '../draw-eye'
import type { EyeColours } from '../eye-colours'
import type { LightTables } from '../light-tables'
import type { SheetSize } from './body-sheet'
import { toHalf } from './half-float'
import type { HalfSheet } from './paint-sheet'

const SIDE = 160

/** A fitted eye seen straight on and evenly lit: iris, pupil, rim. The dome fills the sheet. */
export function eyeSheet(colours: EyeColours, tables: LightTables): SheetSize & { light: HalfSheet } {
  const canvas = newCanvas(SIDE, SIDE)
  // The eye lies where the body lies; a little larger than its sheet, so that the rim has no empty texels.
  canvas.body.fill(1)
  const per = 2 / SIDE
  drawEye(canvas, {
    side: 1, centre: [SIDE / 2, SIDE / 2], inverse: [per, 0, 0, -per], facing: [0, 0, 1], toTail: [1, 0, 0], up: [0, 1, 0], radius: 1,
  }, colours, tables, true)
  const light = new Uint16Array(4 * SIDE * SIDE)
  for (let i = 0; i < SIDE * SIDE; i++) {
    const whole = canvas.cover[i]! > 0 ? 1 / canvas.cover[i]! : 0
    for (let c = 0; c < 3; c++) light[4 * i + c] = toHalf(whole * canvas.light[3 * i + c]!)
  }
  return { width: SIDE, height: SIDE, light }
}
