import { computed, effectScope, nextTick, ref, shallowRef } from 'vue'
import { useTurn, type TurnWish } from '~/composables/turn/use-turn'
import { useTurnHand } from '~/composables/turn/use-turn-hand'
import { labFromXyz } from '#shared/optics/colorimetry'
import { deltaE2000 } from '#shared/optics/delta-e'
import { decodeChannel, xyzFromLinearRgb } from '#shared/optics/screen-colour'
import type { Look } from '#shared/picture/look'
import { renderLook } from '#shared/picture/render'
import { turnWords, UNTURNED, type TurnAngles } from '#shared/picture/turn/turn-angles'
import { ember, perch, roach } from '../../fixtures/demo-looks'

/** A page with nothing but one turning view, for the spec beside it. */

const SURROUND = 119

/** The perch's blank under one white or black coat, and perhaps a pearl over it. */
function evenly(...paints: string[]): Look {
  const item = perch.body.stack.find(each => each.act === 'coat')!
  const idOf = (name: string) => perch.materials.paints.find(paint => paint.name === name)!.id
  const stack = paints.map((name, i) => ({
    ...item, coat: {
      ...item.coat, id: `0000000${i}-0000-4000-8000-000000000000`, passes: 4, where: { ...item.coat.where, zones: [], fins: [] }, marks: [],
      gun: { ...item.coat.gun, aim: 'all over' as const }, mix: { ...item.coat.mix, parts: [{ paintId: idOf(name), drops: 1 }] },
    },
  }))
  return { ...perch, body: { ...perch.body, stack, masks: [], eyes: null } }
}

const looks: Record<string, Look> = { perch, roach, ember, white: evenly('Opaque white'), pearl: evenly('Opaque black', 'Silver pearl') }

const canvas = document.querySelector('canvas')!
// The view asks for the context it wants; here what it draws is kept, so that it can be read at any time.
canvas.getContext('webgl2', { alpha: false, antialias: false, depth: false, stencil: false, preserveDrawingBuffer: true })
const angles = ref<TurnAngles>({ ...UNTURNED })
const wish = shallowRef<TurnWish | null>(null)
const view = effectScope()
const { stage, busy, settled, trouble } = view.run(() => useTurn(
  shallowRef(canvas), wish, computed(() => ({ angles: angles.value, width: canvas.clientWidth, height: canvas.clientHeight, surround: SURROUND })),
))!
const hand = useTurnHand(angles)
canvas.addEventListener('pointerdown', hand.hold)
canvas.addEventListener('pointermove', hand.drag)
canvas.addEventListener('pointerup', hand.let)
canvas.addEventListener('keydown', hand.key)

function pixelsOf(draw: (pen: CanvasRenderingContext2D) => void): number[] {
  const copy = Object.assign(document.createElement('canvas'), { width: canvas.clientWidth, height: canvas.clientHeight })
  const pen = copy.getContext('2d')!
  draw(pen)
  return [...pen.getImageData(0, 0, copy.width, copy.height).data]
}

const labAt = (rgba: number[], pixel: number) =>
  labFromXyz(xyzFromLinearRgb([0, 1, 2].map(c => decodeChannel(rgba[4 * pixel + c]! / 255)) as [number, number, number])) // three by the list
const isShown = (rgba: number[], pixel: number) => [0, 1, 2].some(c => Math.abs(rgba[4 * pixel + c]! - SURROUND) > 3)
/** What is shown once all goes are drawn, RGBA. */
async function shown(): Promise<number[]> {
  while (!settled.value) await new Promise(requestAnimationFrame)
  return pixelsOf(pen => pen.drawImage(canvas, 0, 0))
}

let losing: WEBGL_lose_context | null = null

export const turning = {
  async show(name: string, scale: number, more: Partial<TurnWish> = {}) {
    wish.value = { look: looks[name]!, upTo: 'all', clear: true, light: 'bench', seen: { light: 'D65' }, scale, ...more }
    await nextTick()
  },
  async turnTo(turn: number, tip: number) {
    angles.value = { turn, tip }
    await nextTick()
    await nextTick()
  },
  state: () => ({ stage: busy.value ? 'busy' : stage.value, trouble: trouble.value, words: turnWords(angles.value) }),
  shown,
  /** How far what is shown lies from the side view of a look, CIEDE2000, where both show something. */
  async fromSideView(name: string, clear: boolean) {
    const [width, height] = [canvas.clientWidth, canvas.clientHeight]
    const side = pixelsOf(pen => pen.putImageData(new ImageData(renderLook(looks[name]!, { width, height, clear, surround: SURROUND }).rgba, width, height), 0, 0))
    const turned = await shown()
    const far: number[] = []
    for (let pixel = 0; pixel < width * height; pixel += 3) {
      if (isShown(turned, pixel) && isShown(side, pixel)) far.push(deltaE2000(labAt(turned, pixel), labAt(side, pixel)))
    }
    far.sort((a, b) => a - b)
    return { count: far.length, half: far[Math.floor(far.length / 2)]!, most: far[Math.floor(0.9 * far.length)]! }
  },
  /** Pixels that are not the surround, and the colours of corners and edges. */
  async onSurround() {
    const [width, height] = [canvas.clientWidth, canvas.clientHeight]
    const rgba = await shown()
    let count = 0
    for (let pixel = 0; pixel < width * height; pixel++) if (isShown(rgba, pixel)) count++
    const border = [0, width - 1, (height - 1) * width, width * height - 1, Math.round(width / 2), Math.round(height / 2) * width]
    return { share: count / (width * height), border: border.map(pixel => rgba.slice(4 * pixel, 4 * pixel + 4)) }
  },
  /** Mean lightness of the middle of the picture. */
  async middleLightness() {
    const [width, height] = [canvas.clientWidth, canvas.clientHeight]
    const rgba = await shown()
    let [sum, count] = [0, 0]
    for (let y = Math.round(height / 2) - 4; y < height / 2 + 4; y++) {
      for (let x = Math.round(width / 2) - 20; x < width / 2 + 20; x++, count++) sum += labAt(rgba, y * width + x)[0]
    }
    return sum / count
  },
  /** Takes the graphics processor away, or gives it back. */
  lose() {
    losing = canvas.getContext('webgl2')!.getExtension('WEBGL_lose_context')
    losing!.loseContext()
  },
  giveBack: () => losing!.restoreContext(),
  close: () => view.stop(),
}
Object.assign(globalThis, { turning })
