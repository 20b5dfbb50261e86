import type { Page } from '@playwright/test'

/** Presses that move on, take something away or leave; all others are smaller by right. */
const MAIN = /^(Next|Finish|Take back|Set aside|Set it aside|Heard|Leave the bench|Sign out|It fails|It passes|Note it|One pass on)/

/**
 * What is wrong with presses and words that are seen, for gloves and distance: main presses under 72 px, others under 48,
 * presses nearer than 12 px to each other, words under 24 px or under 7 : 1 against what they stand on.
 */
export async function faultsOfTouch(page: Page, within = 'body'): Promise<string[]> {
  return page.evaluate(({ within, main }) => {
    const root = document.querySelector(within) ?? document.body
    const isMain = new RegExp(main)
    const faults: string[] = []
    const seen = (element: Element) => {
      const box = element.getBoundingClientRect()
      return box.width > 2 && box.height > 2 && element.checkVisibility({ visibilityProperty: true }) && !element.closest('.sr-only, .reason, [hidden]') && (within !== 'body' || !element.closest('dialog'))
    }
    const nameOf = (element: Element) => element.getAttribute('aria-label') ?? element.textContent?.trim().replace(/\s+/g, ' ') ?? ''

    const foot = document.querySelector('footer')
    const presses = [...root.querySelectorAll('button, a[href], input:not([type=file]), textarea, select')].filter(seen)
    const boxes = presses.map(press => ({ name: nameOf(press), box: press.getBoundingClientRect(), isFoot: foot?.contains(press) ?? false }))
    for (const { name, box } of boxes) {
      const least = isMain.test(name) ? 72 : 48
      if (box.width < least - 0.5 || box.height < least - 0.5) faults.push(`${name}: ${Math.round(box.width)} × ${Math.round(box.height)}`)
    }
    boxes.forEach((one, n) => boxes.slice(n + 1).forEach((other) => {
      // The foot lies over what scrolls under it.
      if (one.isFoot !== other.isFoot) return
      const gap = Math.max(one.box.left - other.box.right, other.box.left - one.box.right, one.box.top - other.box.bottom, other.box.top - one.box.bottom)
      if (gap < 11.5) faults.push(`${one.name} | ${other.name}: ${gap.toFixed(1)} px apart`)
    }))

    const channels = (colour: string) => (colour.match(/[\d.]+/g) ?? []).map(Number)
    const light = (colour: string) => {
      const [r = 0, g = 0, b = 0] = channels(colour).slice(0, 3).map((value) => {
        const share = value / 255
        return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4
      })
      return 0.2126 * r + 0.7152 * g + 0.0722 * b
    }
    const ground = (element: Element | null): string => {
      for (let at = element; at; at = at.parentElement) {
        const colour = getComputedStyle(at).backgroundColor
        if ((channels(colour)[3] ?? 1) > 0.99) return colour
      }
      return 'rgb(255, 255, 255)'
    }
    const words = document.createTreeWalker(root, NodeFilter.SHOW_TEXT)
    while (words.nextNode()) {
      const holder = words.currentNode.parentElement
      const text = words.currentNode.textContent?.trim()
      if (!text || !holder || !seen(holder) || holder.closest('script, style, title')) continue
      const style = getComputedStyle(holder)
      const size = Number.parseFloat(style.fontSize)
      const [a, b] = [light(style.color), light(ground(holder))].sort((x, y) => y - x) as [number, number]
      const contrast = (a + 0.05) / (b + 0.05)
      if (size < 23.9) faults.push(`${text.slice(0, 30)}: ${size} px`)
      if (contrast < 6.99) faults.push(`${text.slice(0, 30)}: ${contrast.toFixed(2)} : 1`)
    }
    return [...new Set(faults)]
  }, { within, main: MAIN.source })
}

/** Presses that take something away and are hit by a tap aimed at the middle of another one, so many px off in any direction. */
export async function strayTaps(page: Page, off: number): Promise<string[]> {
  return page.evaluate((off) => {
    const takesAway = /^(Take back|Set aside|Leave the bench|Sign out)/
    const nameOf = (element: Element) => element.getAttribute('aria-label') ?? element.textContent?.trim().replace(/\s+/g, ' ') ?? ''
    const strays: string[] = []
    for (const aimed of document.querySelectorAll('button, a[href]')) {
      aimed.scrollIntoView({ block: 'center' })
      const box = aimed.getBoundingClientRect()
      if (box.width < 2 || !aimed.checkVisibility() || aimed.closest('dialog')) continue
      for (let turn = 0; turn < 16; turn++) {
        const angle = turn * Math.PI / 8
        const hit = document.elementFromPoint(box.left + box.width / 2 + off * Math.cos(angle), box.top + box.height / 2 + off * Math.sin(angle))?.closest('button, a[href]')
        if (hit && hit !== aimed && takesAway.test(nameOf(hit))) strays.push(`${nameOf(aimed)} hits ${nameOf(hit)}`)
      }
    }
    window.scrollTo(0, 0)
    return [...new Set(strays)]
  }, off)
}
