import AxeBuilder from '@axe-core/playwright'
import { type Page, expect, test } from '@playwright/test'
import { enter } from './sign-in'

/* Find a coat, as a painter does it at the desk: a wanted colour, a zone, what the shelf has for it, and one press that lays it. */
test.describe.configure({ mode: 'serial' })

const FINISH = `Ruffe ${crypto.randomUUID().slice(0, 6)}`

async function openSheet(page: Page) {
  await page.getByRole('button', { name: 'Find a coat' }).first().click()
  const sheet = page.getByRole('dialog', { name: 'Find a coat' })
  await expect(sheet).toBeVisible()
  return sheet
}

test('a typed colour is answered with paints and passes, and the one that is laid is in the draft', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/schemes/new')
  await page.getByLabel('Name', { exact: true }).fill(FINISH)
  await page.getByLabel(/^Fish/).fill('Ruffe')
  await page.getByRole('button', { name: 'Start the scheme' }).click()
  await page.waitForURL(/\/schemes\/[0-9a-f-]{36}$/)
  const id = page.url().split('/').at(-1)!
  await expect(page.getByText(/lightness \d+, chroma \d+/).first()).toBeVisible()

  const sheet = await openSheet(page)
  await sheet.getByText('typed', { exact: true }).click()
  await sheet.getByLabel('Colour, as Lab or CSS').fill('58,5 14 43')
  await sheet.getByLabel(/^What it is called/).fill('the old ochre')
  const one = sheet.getByRole('group', { name: 'Out of one bottle' })
  await expect(one.getByRole('radio')).toHaveCount(3)
  await expect(sheet.getByRole('group', { name: 'Mixed in the cup' }).getByRole('radio')).toHaveCount(3)
  // Ochre itself is in the shelf, and its own colour is what was asked for.
  await one.getByRole('radio', { name: /^Ochre/ }).check({ force: true })
  await expect(sheet.getByText(/A film 15 % thinner or thicker stays within \d/)).toBeVisible()
  await expect(sheet.getByRole('img', { name: /with the proposed coat/ })).toBeVisible()
  const { violations } = await new AxeBuilder({ page }).include('dialog[open]').withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze()
  expect(violations.map(each => `${each.id}: ${each.nodes[0]?.html}`)).toEqual([])

  await sheet.getByRole('button', { name: /^Lay \d+ pass/ }).click()
  await expect(sheet).toBeHidden()
  await expect(page.getByText(/^Saved/)).toBeVisible()
  interface Draft { draft: { stack: { act: string, coat?: { note: string, passes: number, mix: { parts: { paintId: string }[] } } }[] }, materials: { paints: { id: string, name: string }[] } }
  await expect.poll(async () => {
    const { draft, materials } = await (await page.request.get(`/api/schemes/${id}`)).json() as Draft
    const laid = draft.stack.flatMap(item => item.coat ?? []).find(coat => coat.note === 'the old ochre')
    return laid?.mix.parts.map(part => materials.paints.find(paint => paint.id === part.paintId)?.name)
  }).toEqual(['Ochre'])
  expect(breaches).toEqual([])
  await page.context().close()
})

test('what no paint reaches is said, with the reason, and a file that is no photo is refused in words', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/schemes')
  await page.getByRole('link', { name: new RegExp(FINISH) }).first().click()
  await page.waitForURL(/\/schemes\/[0-9a-f-]{36}$/)
  await expect(page.getByText(/lightness \d+, chroma \d+/).first()).toBeVisible()
  const sheet = await openSheet(page)
  await sheet.getByText('typed', { exact: true }).click()
  await sheet.getByLabel('Colour, as Lab or CSS').fill('#2000ff')
  await expect(sheet.getByText('Nothing here comes near.')).toBeVisible()
  await expect(sheet.getByText(/The nearest is far: \d+/)).toBeVisible()

  await sheet.getByText('photo', { exact: true }).click()
  await sheet.getByLabel('Choose a photo').setInputFiles({ name: 'no-photo.jpg', mimeType: 'image/jpeg', buffer: Buffer.from('this is no photo') })
  await expect(sheet.getByText(/could not be opened as a photo/)).toBeVisible()
  await page.keyboard.press('Escape')
  await expect(sheet).toBeHidden()
  expect(breaches).toEqual([])
  await page.context().close()
})
