/** Greys of the belly surface (app/assets/css/tokens.css), light and dark: a plot stands on a page, so it follows the page. */
const STYLE = [
  'text{font:13px system-ui,sans-serif;fill:#474747}', '.name{fill:#0d0d0d;font-weight:600}', '.axis{stroke:#6d6d6d;fill:none}', '.grid{stroke:#c4c4c4;fill:none}',
  '.line{fill:none;stroke:#0d0d0d;stroke-width:2;stroke-linejoin:round}', '.two{stroke-dasharray:7 4}', '.three{stroke-dasharray:2 4}', '.four{stroke-dasharray:9 3 2 3}', '.soft{stroke:#6d6d6d}',
  '@media (prefers-color-scheme:dark){text{fill:#bdbdbd}.name{fill:#f0f0f0}.axis{stroke:#8f8f8f}.grid{stroke:#454545}.line{stroke:#f0f0f0}.soft{stroke:#8f8f8f}}',
].join('')

/** Line styles, told apart without colour. */
export const LINES = ['line', 'line two', 'line three', 'line four'] as const
export type LineStyle = typeof LINES[number]

/** A picture in parts, drawn in order. */
export interface Svg { width: number, height: number, title: string, parts: readonly string[] }

/** The picture as a file. Numbers are rounded to a tenth of a pixel, so that it is the same on every machine. */
export function svgText({ width, height, title, parts }: Svg): string {
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}" width="${width}" height="${height}" role="img" aria-label="${escaped(title)}">`,
    `<title>${escaped(title)}</title>`, `<style>${STYLE}</style>`, ...parts, '</svg>', '',
  ].join('\n')
}

/** A patch of colour. */
export function patch(x: number, y: number, width: number, height: number, fill: string): string {
  return `<rect x="${tenth(x)}" y="${tenth(y)}" width="${tenth(width)}" height="${tenth(height)}" fill="${fill}"/>`
}

/** Words at a place. */
export function words(x: number, y: number, text: string, anchor: 'start' | 'middle' | 'end' = 'start', kind: 'name' | '' = ''): string {
  return `<text x="${tenth(x)}" y="${tenth(y)}"${anchor === 'start' ? '' : ` text-anchor="${anchor}"`}${kind ? ` class="${kind}"` : ''}>${escaped(text)}</text>`
}

/** A line through places. */
export function line(points: readonly (readonly [number, number])[], kind: string): string {
  return `<path class="${kind}" d="${points.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${tenth(x)} ${tenth(y)}`).join('')}"/>`
}

function tenth(value: number): string {
  return String(Math.round(10 * value) / 10)
}

function escaped(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('"', '&quot;')
}
