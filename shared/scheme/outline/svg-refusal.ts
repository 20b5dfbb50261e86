/** Why a drawing is not taken, as a sentence a painter can act on. */
export class SvgRefusal extends Error {
  override readonly name = 'SvgRefusal'
}

/** One element of a drawing: its name without prefix, its attributes, and what stands in it. */
export interface SvgNode {
  readonly name: string
  readonly attributes: Readonly<Record<string, string>>
  readonly children: readonly SvgNode[]
  /** Words inside a style sheet; empty elsewhere. */
  readonly text: string
}

/** Limits of a drawing, so that nobody waits for one and none fills the draft. */
export const SVG_LIMITS = { bytes: 512 * 1024, elements: 5000, deep: 32, pathData: 200_000, points: 60_000 } as const

const SCRIPT = 'It carries a script. Outlines need none: save it as plain SVG.'
const REFERENCE = 'It refers to something outside its outlines (a link, a copy or a picture). Turn copies into paths, take pictures out, and save it as plain SVG.'
const PAINT_REFERENCE = 'It is filled by a reference (a gradient, a pattern or a file). Give its outlines a plain fill, and save it as plain SVG.'
const LETTERS = 'It has letters in it. Turn them into paths first: a letter is no outline until then.'

const REFUSED: ReadonlyMap<string, string> = new Map(Object.entries({
  script: SCRIPT, handler: SCRIPT, listener: SCRIPT, foreignObject: SCRIPT, iframe: SCRIPT,
  animate: SCRIPT, animateTransform: SCRIPT, animateMotion: SCRIPT, set: SCRIPT,
  use: REFERENCE, image: REFERENCE, a: REFERENCE, feImage: REFERENCE, video: REFERENCE, audio: REFERENCE,
  text: LETTERS, textPath: LETTERS, tspan: LETTERS,
}))

/** Refuses a file before it is parsed: by its size, and for what only markup has. */
export function refuseText(text: string): void {
  if (new TextEncoder().encode(text).length > SVG_LIMITS.bytes) throw new SvgRefusal(`It is larger than ${SVG_LIMITS.bytes / 1024} KB. Simplify its paths, and save it as plain SVG.`)
  if (text.trim() === '') throw new SvgRefusal('It is empty.')
  if (/<!ENTITY/i.test(text) || /<!DOCTYPE[^>]*\[/i.test(text)) throw new SvgRefusal('It declares entities of its own. Save it as plain SVG without them.')
  if (/&(?!(?:amp|lt|gt|quot|apos|#\d{1,7}|#x[\da-f]{1,6});)/i.test(text)) throw new SvgRefusal('It uses an entity that plain SVG does not have. Save it as plain SVG.')
  if (/<\?xml-stylesheet/i.test(text)) throw new SvgRefusal(REFERENCE)
}

/** Refuses what is not geometry, anywhere in a drawing: scripts, references, letters, and more than anybody cuts. */
export function refuseNodes(root: SvgNode): void {
  if (root.name !== 'svg') throw new SvgRefusal('It is no SVG drawing.')
  let count = 0
  const visit = (node: SvgNode, deep: number) => {
    count++
    if (count > SVG_LIMITS.elements) throw new SvgRefusal(`It has more than ${SVG_LIMITS.elements} parts. Simplify it first.`)
    if (deep > SVG_LIMITS.deep) throw new SvgRefusal('Its groups are nested too deep. Ungroup it, and save it as plain SVG.')
    const because = REFUSED.get(node.name)
    if (because) throw new SvgRefusal(because)
    if (node.name === 'svg' && deep > 0) throw new SvgRefusal('It has a drawing within the drawing. Ungroup it, and save it as plain SVG.')
    refuseAttributes(node)
    if (node.name === 'style' && isReference(node.text)) throw new SvgRefusal(PAINT_REFERENCE)
    node.children.forEach(child => visit(child, deep + 1))
  }
  visit(root, 0)
}

function refuseAttributes({ attributes }: SvgNode): void {
  for (const [key, value] of Object.entries(attributes)) {
    const name = key.toLowerCase()
    if (/^on[a-z]/.test(name) || /^\s*(?:java|vb)script:/i.test(value)) throw new SvgRefusal(SCRIPT)
    if (/(?:^|:)(?:href|src|base)$/.test(name)) throw new SvgRefusal(REFERENCE)
    if (!name.startsWith('xmlns') && isReference(value)) throw new SvgRefusal(PAINT_REFERENCE)
  }
}

/** CSS may write `url(` with escapes; a value with a backslash is not plain either. */
function isReference(css: string): boolean {
  return /url\s*\(|@import|expression\s*\(|\\/i.test(css)
}
