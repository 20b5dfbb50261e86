import AxeBuilder from '@axe-core/playwright'
import { type Page, expect, test } from '@playwright/test'
import { enter } from './sign-in'

/* Work by hand: lines on a coat, stencils of one's own, and paper to cut them from. */
test.describe.configure({ mode: 'serial' })

const FINISH = `Dace ${crypto.randomUUID().slice(0, 6)}`
const PLATE = `Gill plate ${crypto.randomUUID().slice(0, 6)}`
const drawing = (inside: string) => `<svg xmlns="http://www.w3.org/2000/svg" width="30mm" height="12mm" viewBox="0 0 30 12">${inside}</svg>`
const svgFile = (inside: string) => ({ name: 'plate.svg', mimeType: 'image/svg+xml', buffer: Buffer.from(drawing(inside)) })

interface Draft { draft: { stack: { act: string, coat?: { marks: { kind: string, strokes?: { points: [number, number][] }[] }[] } }[] } }

async function marksOf(page: Page) {
  const id = page.url().split('/').at(-1)!
  const { draft } = await (await page.request.get(`/api/schemes/${id}`)).json() as Draft
  return draft.stack.flatMap(item => item.coat?.marks ?? [])
}

async function noAxe(page: Page, within: string) {
  const { violations } = await new AxeBuilder({ page }).include(within).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze()
  expect(violations.map(each => `${each.id}: ${each.nodes[0]?.html}`)).toEqual([])
}

test('a painter draws on the blank, moves what was drawn by keys, and finds it in the draft as geometry', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/schemes/new')
  await page.getByLabel('Name', { exact: true }).fill(FINISH)
  await page.getByLabel(/^Fish/).fill('Dace')
  await page.getByRole('button', { name: 'Start the scheme' }).click()
  await page.waitForURL(/\/schemes\/[0-9a-f-]{36}$/)
  await page.getByRole('button', { name: 'Coat above' }).first().click()
  const shelf = page.getByRole('dialog')
  await shelf.getByLabel('Look for a paint').fill('Olive green')
  await shelf.getByRole('button', { name: /^Olive green/ }).first().click()
  await expect(shelf).toBeHidden()

  await page.getByRole('button', { name: 'Draw on the blank' }).click()
  const desk = page.getByRole('dialog', { name: /by hand/ })
  const board = desk.getByRole('group', { name: /^Drawing on the left side/ })
  const box = (await board.boundingBox())!
  const at = (x: number, y: number) => [box.x + box.width * x, box.y + box.height * y] as const
  await page.mouse.move(...at(0.35, 0.45))
  await page.mouse.down()
  for (let k = 1; k <= 20; k++) await page.mouse.move(...at(0.35 + 0.015 * k, 0.45 + 0.04 * Math.sin(k / 3)))
  await page.mouse.up()
  const list = desk.getByRole('list', { name: 'Drawn by hand' })
  await expect(list.getByRole('button')).toHaveCount(1)
  await noAxe(page, 'dialog[open]')

  // The same without drawing: by figures, by keys, and at its own place.
  await desk.getByText('Lay it by figures').click()
  await desk.getByRole('button', { name: 'Lay it there' }).click()
  await desk.getByRole('button', { name: 'At its own place' }).click()
  await page.getByRole('menuitem', { name: 'Gill mark' }).click()
  await expect(list.getByRole('button')).toHaveCount(3)
  const last = list.getByRole('button').last()
  const before = await last.textContent()
  await expect(last).toHaveAttribute('aria-pressed', 'true')
  await last.press('Shift+ArrowRight')
  await expect(last).not.toHaveText(before!)
  await last.press('Delete')
  await expect(list.getByRole('button')).toHaveCount(2)
  await desk.getByRole('button', { name: 'Done' }).click()
  await expect(page.getByText(/^Saved/)).toBeVisible()
  await expect.poll(async () => (await marksOf(page)).map(mark => [mark.kind, mark.strokes?.length])).toEqual([['strokes', 2]])
  const [mark] = await marksOf(page)
  expect(mark?.strokes?.[0]?.points.length).toBeLessThan(20)
  expect(breaches).toEqual([])
  await page.context().close()
})

test('a drawing with a script is refused in words, a plain one becomes a stencil at true size', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/masks')
  await page.getByRole('button', { name: 'Add a mask' }).click()
  const dialog = page.getByRole('dialog', { name: 'A mesh or a stencil' })
  await dialog.getByLabel('Name', { exact: true }).fill(PLATE)
  await dialog.getByText('stencil', { exact: true }).click()
  await dialog.getByText('drawn or brought in', { exact: true }).click()
  const file = dialog.getByLabel('Bring in an SVG file')
  await file.setInputFiles(svgFile('<script>window.planted = 1</script><circle cx="15" cy="6" r="5"/>'))
  await expect(dialog.getByText(/was not brought in\. It carries a script/)).toBeVisible()
  expect(await page.evaluate(() => 'planted' in window)).toBe(false)
  await file.setInputFiles(svgFile('<circle cx="15" cy="6" r="5"/><path d="M1 1h6v4H1z"/>'))
  await expect(dialog.getByText(/2 outlines brought in at true size/)).toBeVisible()
  await noAxe(page, 'dialog[open]')
  await dialog.getByRole('spinbutton', { name: 'Turned by' }).fill('15')
  await dialog.getByRole('spinbutton', { name: 'Turned by' }).press('Enter')
  await dialog.getByRole('button', { name: 'Keep it' }).click()
  await expect(page.getByRole('heading', { name: PLATE })).toBeVisible()

  await page.getByRole('link', { name: `Print ${PLATE} at true size` }).click()
  const sheet = page.getByRole('img', { name: /at true size\.$/ }).first()
  await expect(sheet).toBeVisible()
  // CSS says 96 px are an inch: the sheet is A4 to the pixel.
  const size = (await sheet.boundingBox())!
  expect([size.width, size.height].sort((a, b) => a - b).map(px => Math.round(px * 25.4 / 96))).toEqual([210, 297])
  await page.getByText('Letter', { exact: true }).click()
  await expect(page.getByRole('img', { name: /Letter, at true size\.$/ }).first()).toBeVisible()
  expect(breaches).toEqual([])
  await page.context().close()
})

test('a mask that two people change is shown in both versions, and nothing is lost', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/masks')
  await page.getByRole('button', { name: `Change ${PLATE}` }).click()
  const dialog = page.getByRole('dialog', { name: `Change ${PLATE}` })
  await dialog.getByLabel('Name', { exact: true }).fill(`${PLATE} mine`)

  interface Kept { id: string, name: string, form: unknown, version: number }
  const kept = (await (await page.request.get('/api/masks')).json() as Kept[]).find(mask => mask.name === PLATE)!
  const theirs = await page.request.put(`/api/masks/${kept.id}`, { data: { name: `${PLATE} theirs`, form: kept.form }, headers: { 'if-match': `"v${kept.version}"`, 'origin': new URL(page.url()).origin } })
  expect(theirs.status()).toBe(200)

  await dialog.getByRole('button', { name: 'Keep the change' }).click()
  const clash = page.getByRole('dialog', { name: 'Somebody changed this mask meanwhile' })
  await expect(clash.getByRole('cell', { name: `${PLATE} mine` })).toBeVisible()
  await expect(clash.getByRole('cell', { name: `${PLATE} theirs` })).toBeVisible()
  await noAxe(page, 'dialog[open]:last-of-type')
  await clash.getByRole('button', { name: 'Keep mine' }).click()
  await expect(page.getByRole('heading', { name: `${PLATE} mine` })).toBeVisible()
  expect(breaches).toEqual([])
  await page.context().close()
})
