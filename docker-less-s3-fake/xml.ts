const ENTITIES: Record<string, string> = { lt: '<', gt: '>', quot: '"', apos: '\'', amp: '&' }

// Control characters may not stand in XML as they are.
// eslint-disable-next-line no-control-regex -- they are what is looked for
const UNSAFE = /[<>&"'\u0000-\u001f\u007f]/g

/** Text as it may stand between XML tags; control characters survive as references. */
export function escapeXml(text: string): string {
  return text.replace(UNSAFE, char => `&#x${char.charCodeAt(0).toString(16).toUpperCase()};`)
}

function unescapeXml(text: string): string {
  return text.replace(/&(?:#x([0-9a-f]+)|#([0-9]+)|([a-z]+));/gi, (whole, hex?: string, decimal?: string, name?: string) => {
    if (hex) return String.fromCodePoint(Number.parseInt(hex, 16))
    if (decimal) return String.fromCodePoint(Number.parseInt(decimal, 10))
    return ENTITIES[name ?? ''] ?? whole
  })
}

/** What may stand inside an element: text, or further elements by name; an array repeats the element. */
export type XmlContent = string | number | boolean | XmlElements
export interface XmlElements { [name: string]: XmlContent | XmlContent[] | undefined }

function element(name: string, content: XmlContent): string {
  return `<${name}>${typeof content === 'object' ? elements(content) : escapeXml(String(content))}</${name}>`
}

function elements(content: XmlElements): string {
  return Object.entries(content)
    .flatMap(([name, value]) => (Array.isArray(value) ? value : [value]).map(one => (one === undefined ? '' : element(name, one))))
    .join('')
}

/** A whole XML document with S3's namespace on its root. */
export function xmlDocument(root: string, content: XmlElements): string {
  return `<?xml version="1.0" encoding="UTF-8"?>\n<${root} xmlns="http://s3.amazonaws.com/doc/2006-03-01/">${elements(content)}</${root}>`
}

/** The inner text of every `<name>` in a piece of XML, in order; enough for the flat documents S3 clients send. */
export function xmlBlocks(xml: string, name: string): string[] {
  return [...xml.matchAll(new RegExp(`<${name}(?:\\s[^>]*)?>([\\s\\S]*?)</${name}>`, 'g'))].map(match => match[1] ?? '')
}

/** The text of the first `<name>`, with its references resolved. */
export function xmlText(xml: string, name: string): string | undefined {
  const [block] = xmlBlocks(xml, name)
  return block === undefined ? undefined : unescapeXml(block)
}
