import AxeBuilder from '@axe-core/playwright'
import { type Locator, type Page, expect, test } from '@playwright/test'
import { alive, enter } from './sign-in'

/* Ground matters, masks span coats, any two finishes can be wiped across each other, and the app lists its keys. */
interface Listed { items: { id: string, name: string, coats: number, masks: number, headNumber: number, blank: { id: string } }[] }
interface Scheme { id: string, draft: { stack: { act: string, maskId?: string, coat?: { id: string } }[] } }

const schemes = async (page: Page) => (await (await page.request.get('/api/schemes?limit=60')).json() as Listed).items
const stackOf = async (page: Page, id: string) => (await (await page.request.get(`/api/schemes/${id}`)).json() as Scheme).draft.stack

/** A colourway of the demo's scheme with the most masks: one that no other test works on. */
async function colourway(page: Page): Promise<{ id: string, from: string }> {
  const [most] = (await schemes(page)).filter(each => each.headNumber > 0).sort((a, b) => b.masks - a.masks)
  const made = await page.request.post(`/api/schemes/${most!.id}/fork`, {
    data: { name: `Colourway ${crypto.randomUUID().slice(0, 6)}`, number: most!.headNumber }, headers: { origin: new URL(page.url()).origin },
  })
  expect(made.status()).toBe(201)
  return { id: (await made.json() as Scheme).id, from: most!.id }
}

async function open(page: Page, id: string): Promise<Locator> {
  await page.goto(`/schemes/${id}`)
  await alive(page)
  await expect(page.getByText(/lightness \d+, chroma \d+/).first()).toBeVisible()
  return page.getByRole('region', { name: 'Film section' })
}

async function faultless(page: Page) {
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze()
  expect(violations.map(each => `${each.id}: ${each.nodes[0]?.html}`)).toEqual([])
}

test('a coat carried up the stack marks the coats it was under, until something else is done', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/schemes')
  const { id } = await colourway(page)
  const film = await open(page, id)
  const third = film.getByRole('button', { name: /^Coat 3, / })
  const title = (await third.getAttribute('aria-label'))!.split(', ')[1]!
  await film.getByRole('button', { name: `Move ${title}`, exact: true }).focus()
  for (const key of ['Space', 'ArrowUp', 'ArrowUp', 'Space']) await page.keyboard.press(key)
  await expect(film.getByRole('button', { name: /^Coat \d+, .* changed \d+\.\d, most on the / }).first()).toBeVisible()
  await expect(film.getByText(/coats? looks? otherwise now/)).toBeVisible()
  // The coat itself is what was done, not what follows from it.
  await expect(film.getByRole('button', { name: new RegExp(`^Coat \\d+, ${title}, .* changed`) })).toHaveCount(0)
  await faultless(page)
  for (let steps = 0; steps < 2; steps++) await page.getByRole('button', { name: /^Undo: / }).click()
  await expect(film.getByText(/coats? looks? otherwise now/)).toHaveCount(0)
  expect(breaches).toEqual([])
  await page.context().close()
})

test('an end of a mask’s bracket is carried by keys and by the pointer; what cannot be is explained', async ({ browser }) => {
  const { page } = await enter(browser, 'painter', '/schemes')
  const { id } = await colourway(page)
  const film = await open(page, id)
  const lift = film.getByRole('button', { name: /^Move where .* is lifted$/ }).first()
  const name = (await lift.getAttribute('aria-label'))!.replace(/^Move where (.*) is lifted$/, '$1')
  const fit = film.getByRole('button', { name: `Move where ${name} is fitted`, exact: true })
  const before = await stackOf(page, id)
  const covered = async () => {
    const stack = await stackOf(page, id)
    const lifts = stack.findIndex(item => item.act === 'lift' && item.maskId === before.find(each => each.act === 'lift')?.maskId)
    return lifts
  }
  const saved = () => expect(page.getByText(/^Saved/)).toBeVisible()

  await fit.focus()
  await page.keyboard.press('Space')
  await expect(fit).toHaveAttribute('aria-pressed', 'true')
  // Past its own lift it cannot be fitted: said, and the stack stays.
  for (let i = 0; i < before.length; i++) await page.keyboard.press('ArrowUp')
  await expect(page.getByText(/cannot be fitted after it is lifted\. Carry its lift up first\./).first()).toBeVisible()
  await page.keyboard.press('Escape')
  await saved()
  expect(await stackOf(page, id)).toEqual(before)

  const [from, target] = [(await lift.boundingBox())!, (await fit.boundingBox())!]
  await page.mouse.move(from.x + from.width / 2, from.y + from.height / 2)
  await page.mouse.down()
  await page.mouse.move(from.x + from.width / 2, (from.y + target.y) / 2, { steps: 8 })
  await page.mouse.move(from.x + from.width / 2, target.y + target.height + 60, { steps: 8 })
  await page.mouse.up()
  // Below its own fit: refused as well, whichever way it came there.
  await expect(page.getByText(/cannot be lifted before it is fitted\. Carry its fit down first\./).first()).toBeVisible()
  expect(await covered()).toBe(before.findIndex(item => item.act === 'lift'))
  await page.context().close()
})

test('two schemes are wiped across each other by pointer, keys and slider, and read as lists and numbers', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/schemes')
  const all = (await schemes(page)).filter(each => each.headNumber > 0)
  const one = all[0]!
  const other = all.find(each => each.blank.id !== one.blank.id) ?? all[1]!
  await page.goto(`/schemes/${one.id}/compare?from=draft`)
  await alive(page)
  await page.getByRole('button', { name: 'Of another scheme' }).click()
  const picker = page.getByRole('dialog', { name: 'Compare with another scheme' })
  await picker.getByLabel('Name, fish or blank').fill(other.name)
  await picker.getByRole('button', { name: new RegExp(`^${other.name}`) }).first().click()
  await expect(page.getByRole('heading', { level: 1, name: `${one.name} and ${other.name}` })).toBeVisible()
  await alive(page)
  if (other.blank.id !== one.blank.id) await expect(page.getByText(/^Two blanks: .* Both are drawn at one scale/)).toBeVisible()
  await expect(page.getByText(/Colour distance after clear/)).toBeVisible()

  await page.getByText('wiped across', { exact: true }).click()
  const divider = page.getByRole('slider', { name: /^Divider between/ })
  await expect(divider).toHaveAttribute('aria-valuenow', '50')
  await divider.focus()
  await page.keyboard.press('ArrowRight')
  await expect(divider).toHaveAttribute('aria-valuenow', '52')
  await page.keyboard.press('Home')
  await expect(divider).toHaveAttribute('aria-valuetext', `only ${other.name}, the draft`)
  const box = (await page.locator('.wipe').boundingBox())!
  await page.mouse.move(box.x + 10, box.y + box.height / 2)
  await page.mouse.down()
  await page.mouse.move(box.x + box.width * 0.75, box.y + box.height / 2, { steps: 6 })
  await page.mouse.up()
  await expect(divider).toHaveAttribute('aria-valuenow', '75')
  await page.getByRole('slider', { name: /^How much of/ }).fill('30')
  await expect(divider).toHaveAttribute('aria-valuenow', '30')
  await expect(page.getByRole('img', { name: /as it looks$/ })).toHaveCount(2)
  await faultless(page)
  await page.emulateMedia({ forcedColors: 'active', reducedMotion: 'reduce' })
  await expect(divider).toBeVisible()
  expect(breaches).toEqual([])
  await page.context().close()
})

test('the list of keys shows those of the screen, opens by ? but not while somebody writes, and can be kept shut', async ({ browser }) => {
  const { page } = await enter(browser, 'painter', '/schemes')
  const { id } = await colourway(page)
  await open(page, id)
  const list = page.getByRole('dialog', { name: 'Keys on this screen' })
  await page.getByLabel('What to watch').focus()
  await page.keyboard.press('?')
  await expect(list).toHaveCount(0)
  await expect(page.getByLabel('What to watch')).toHaveValue(/\?$/)

  await page.getByRole('heading', { level: 1 }).click()
  await page.keyboard.press('?')
  await expect(list).toBeVisible()
  for (const words of ['Undo', 'Carry one row up', 'Show one coat more', '5 degrees toward the flop']) await expect(list.getByText(words, { exact: true })).toBeVisible()
  await expect(list.getByText(/can be dragged\. Without dragging: these keys, or the menu of a coat/)).toBeVisible()
  await faultless(page)
  await list.getByLabel('The ? key opens this list').uncheck({ force: true })
  await list.getByRole('button', { name: 'Close' }).click()
  await page.getByRole('heading', { level: 1 }).click()
  await page.keyboard.press('?')
  await expect(list).toHaveCount(0)
  await page.context().close()
})
