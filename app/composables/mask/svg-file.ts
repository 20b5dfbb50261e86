import { refuseText, SvgRefusal, SVG_LIMITS, type SvgNode } from '#shared/scheme/outline/svg-refusal'
import { svgOutlines, type SvgOutlines } from '#shared/scheme/outline/svg-outlines'

/** A drawing read for its outlines, or the reason why not, as a sentence. */
export type SvgReading = { ok: true } & SvgOutlines | { ok: false, because: string }

/**
 * Reads the outlines of an SVG file's text. The text is parsed as a document nobody shows and read for its numbers; nothing of it
 * ever becomes part of a page, runs, or is fetched.
 */
export function readSvg(text: string): SvgReading {
  try {
    refuseText(text)
    const { documentElement } = new DOMParser().parseFromString(text, 'image/svg+xml')
    if (documentElement.getElementsByTagName('parsererror').length > 0 || documentElement.nodeName === 'parsererror') throw new SvgRefusal('It is no SVG drawing, or it is broken off.')
    return { ok: true, ...svgOutlines(nodeOf(documentElement, 0)) }
  }
  catch (error) {
    if (error instanceof SvgRefusal) return { ok: false, because: error.message }
    throw error
  }
}

/** Reads a file somebody chose; one that is too large is not even opened. */
export async function readSvgFile(file: Pick<File, 'size' | 'text'>): Promise<SvgReading> {
  if (file.size > SVG_LIMITS.bytes) return { ok: false, because: `It is larger than ${SVG_LIMITS.bytes / 1024} KB. Simplify its paths, and save it as plain SVG.` }
  return readSvg(await file.text())
}

/** Children of an element that is deeper than any drawing needs are left to the refusal, not walked. */
function nodeOf(element: Element, deep: number): SvgNode {
  const children = deep > SVG_LIMITS.deep ? [] : Array.from(element.children, child => nodeOf(child, deep + 1))
  return {
    name: element.localName,
    attributes: Object.fromEntries(Array.from(element.attributes, ({ name, value }) => [name, value])),
    children,
    text: element.localName === 'style' ? element.textContent ?? '' : '',
  }
}
