// @vitest-environment happy-dom
import { describe, expect, it } from 'vitest'
import { readSvg, readSvgFile } from '~/composables/mask/svg-file'
import { boxRound, type FlatPoint, ringArea } from '#shared/scheme/outline/flat'

const sheet = (inside: string, more = 'width="100mm" height="50mm" viewBox="0 0 100 50"') => `<svg xmlns="http://www.w3.org/2000/svg" xmlns:xlink="http://www.w3.org/1999/xlink" ${more}>${inside}</svg>`

function outlinesOf(inside: string, more?: string): FlatPoint[][] {
  const reading = readSvg(sheet(inside, more))
  if (!reading.ok) throw new Error(reading.because)
  return reading.outlines
}
const areas = (inside: string, more?: string) => outlinesOf(inside, more).map(ring => Math.abs(ringArea(ring)))
function refusal(text: string): string {
  const reading = readSvg(text)
  return reading.ok ? 'taken' : reading.because
}

describe('a drawing is read as geometry in mm', () => {
  it('gives a circle its area, within half a per cent', () => {
    const [area = 0] = areas('<circle cx="50" cy="25" r="10"/>')
    expect(area / (Math.PI * 100)).toBeGreaterThan(0.995)
    expect(area / (Math.PI * 100)).toBeLessThanOrEqual(1)
  })
  it('gives an ellipse, a rectangle with round corners and a polygon theirs', () => {
    const [ellipse = 0, rect = 0, triangle = 0] = areas('<ellipse cx="20" cy="20" rx="12" ry="5"/><rect x="2" y="2" width="20" height="10" rx="3"/><polygon points="0,0 10,0 0,8"/>')
    expect(ellipse / (Math.PI * 60)).toBeCloseTo(1, 2)
    expect(rect / (200 - (4 - Math.PI) * 9)).toBeCloseTo(1, 2)
    expect(triangle).toBeCloseTo(40, 6)
  })
  it('draws the same circle from arcs, cubics and quarter turns of any transform', () => {
    const k = 10 * 4 / 3 * (Math.SQRT2 - 1)
    const cubic = `M10 0C10 ${k} ${k} 10 0 10S-10 ${k}-10 0S${-k}-10 0-10S10 ${-k} 10 0z`
    const found = areas(`<path d="M0-10a10 10 0 010 20A10 10 0 1 1 0-10Z"/><path d="${cubic}"/><g transform="translate(50,25) rotate(37) skewX(0)"><circle r="5" transform="scale(2)"/></g>`)
    for (const area of found) expect(area / (Math.PI * 100)).toBeCloseTo(1, 2)
    expect(found).toHaveLength(3)
  })
  it('reads relative commands, shorthand and several lines in one path', () => {
    expect(areas('<path d="m0 0h10v10h-10zm20 0 10 0 0 10-10 0z"/>').map(area => Math.round(area * 1e6) / 1e6)).toEqual([100, 100])
    // The area under a parabola is a third of its box.
    const [hump = 0] = areas('<path d="M0 10Q5 0 10 10T20 10L20 30L0 30Z"/>')
    expect(hump).toBeCloseTo(400, 1)
  })
  it('keeps true size whatever unit the sheet has', () => {
    for (const more of ['width="4in" height="2in" viewBox="0 0 400 200"', 'width="10.16cm" height="50.8mm" viewBox="0 0 400 200"', 'width="384" height="192" viewBox="0 0 400 200"']) {
      const box = boxRound(outlinesOf('<rect x="100" y="50" width="200" height="100"/>', more))!
      expect(box.right - box.left).toBeCloseTo(50.8, 9)
      expect(box.high - box.low).toBeCloseTo(25.4, 9)
    }
    const bare = boxRound(outlinesOf('<rect width="96" height="48"/>', ''))!
    expect(bare.right - bare.left).toBeCloseTo(25.4, 9)
  })
  it('has y up: what stands above in the drawing lies nearer the back', () => {
    const [high = [], low = []] = outlinesOf('<rect x="10" y="5" width="5" height="5"/><rect x="10" y="30" width="5" height="5"/>')
    expect(boxRound([high])!.low).toBeGreaterThan(boxRound([low])!.high)
  })
  it('leaves out what is hidden, defined or encloses nothing, and counts the last', () => {
    const reading = readSvg(sheet('<defs><circle r="9"/></defs><circle r="3" display="none"/><circle r="3" style="fill:#000; display:none"/><line x1="0" y1="0" x2="9" y2="9"/><circle cx="9" cy="9" r="3"/>'))
    expect(reading).toMatchObject({ ok: true, tooSmall: 1 })
    expect(reading.ok && reading.outlines).toHaveLength(1)
  })
  it('counts an outline within an outline as an island that falls out', () => {
    expect(readSvg(sheet('<path d="M0 0H20V20H0Z M5 5H10V10H5Z"/>'))).toMatchObject({ ok: true, islands: 1 })
  })
})

describe('what is not geometry is refused in words', () => {
  const circle = '<circle r="5"/>'
  it.each([
    ['a script', sheet(`<script>alert(1)</script>${circle}`), /script/],
    ['a script in a group under another prefix', `<s:svg xmlns:s="http://www.w3.org/2000/svg"><s:g><s:script/></s:g></s:svg>`, /script/],
    ['an event', sheet('<circle r="5" onload="alert(1)"/>'), /script/],
    ['a script address', sheet('<circle r="5" id="javascript:alert(1)"/>'), /script/],
    ['foreign markup', sheet(`<foreignObject><p xmlns="http://www.w3.org/1999/xhtml">x</p></foreignObject>${circle}`), /script/],
    ['movement', sheet('<circle r="5"><animate attributeName="r" to="9"/></circle>'), /script/],
    ['a copy', sheet('<g id="a"/><use href="#a"/>'), /refers/],
    ['a copy by the old name', sheet('<g id="a"/><use xlink:href="#a"/>'), /refers/],
    ['a picture', sheet(`<image href="data:image/png;base64,AA=="/>${circle}`), /refers/],
    ['a link', sheet(`<a href="https://example.test">${circle}</a>`), /refers/],
    ['a gradient that borrows from another', sheet(`<defs><linearGradient id="a" xlink:href="#b"/></defs>${circle}`), /refers/],
    ['a style sheet from elsewhere', `<?xml-stylesheet href="a.css"?>${sheet(circle)}`, /refers/],
    ['a fill by reference', sheet('<circle r="5" fill="url(#g)"/>'), /reference/],
    ['a fill by reference in a style', sheet('<circle r="5" style="fill: URL ( #g )"/>'), /reference/],
    ['an escaped reference in a style', sheet('<circle r="5" style="fill:u\\72l(#g)"/>'), /reference/],
    ['a style sheet that fetches', sheet(`<style>@import "a.css";</style>${circle}`), /reference/],
    ['entities', `<!DOCTYPE svg [<!ENTITY a "b">]>${sheet(circle)}`, /entities/],
    ['an entity nobody declared', sheet(`<title>&nbsp;</title>${circle}`), /entity/],
    ['letters', sheet(`<text x="5">Perch</text>${circle}`), /letters/],
    ['a drawing in a drawing', sheet(`<svg viewBox="0 0 1 1">${circle}</svg>`), /within the drawing/],
    ['groups without end', sheet('<g>'.repeat(40) + circle + '</g>'.repeat(40)), /nested/],
    ['more parts than anybody cuts', sheet('<g/>'.repeat(5001)), /more than 5000/],
    ['a path that breaks off', sheet('<path d="M0 0L10"/>'), /cannot be read/],
    ['a path that begins in the middle', sheet('<path d="L10 10Z"/>'), /cannot be read/],
    ['a command nobody knows', sheet('<path d="M0 0 B1 2"/>'), /cannot be read/],
    ['numbers beyond all bounds', sheet('<path d="M0 0H1e999V5Z"/>'), /cannot be read/],
    ['a transform nobody knows', sheet('<circle r="5" transform="warp(2)"/>'), /transformed/],
    ['an odd polygon', sheet('<polygon points="0,0 10,0 5"/>'), /polygon/],
    ['a view box of nothing', sheet(circle, 'viewBox="0 0 0 50"'), /view box/],
    ['a page', '<html xmlns="http://www.w3.org/1999/xhtml"><body/></html>', /no SVG/],
    ['nothing', ' ', /empty/],
    ['a drawing without outlines', sheet('<line x2="9" y2="9"/>'), /no closed outline/],
    ['a drawing larger than its limit', sheet(`<!--${'x'.repeat(520 * 1024)}-->${circle}`), /larger than 512 KB/],
  ])('%s', (_, text, because) => {
    expect(refusal(text)).toMatch(because)
  })

  it('does not open a file that is too large', async () => {
    const file = { size: 600 * 1024, text: () => Promise.reject(new Error('opened')) }
    expect(await readSvgFile(file)).toMatchObject({ ok: false, because: expect.stringMatching(/larger than 512 KB/) as string })
  })
  it('takes a plain drawing with a document type and without scripts', () => {
    expect(refusal(`<?xml version="1.0"?><!DOCTYPE svg PUBLIC "-//W3C//DTD SVG 1.1//EN" "http://www.w3.org/Graphics/SVG/1.1/DTD/svg11.dtd">${sheet(circle)}`)).toBe('taken')
  })
})
