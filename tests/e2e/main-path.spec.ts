import { type Page, expect, test } from '@playwright/test'
import { cameraPhoto, metadataIn, PLANTED } from '../fixtures/camera-photo'
import { alive, enter } from './sign-in'

/*
 * The whole job as three people do it: a painter builds and publishes a finish, the bench repeats it,
 * the front desk photographs it and shows it to a customer, who has no account and sees no recipe.
 */
test.describe.configure({ mode: 'serial' })

const FINISH = `Gudgeon ${crypto.randomUUID().slice(0, 6)}`
const NOTE = 'planted revision note'
const PIECES = 2
let schemeId = ''
let link = ''

async function settle(page: Page) {
  await expect(page.getByText(/^Saved/)).toBeVisible()
}

async function lay(page: Page, paint: string) {
  await page.getByRole('button', { name: 'Coat above' }).first().click()
  const shelf = page.getByRole('dialog')
  await shelf.getByLabel('Look for a paint').fill(paint)
  await shelf.getByRole('button', { name: new RegExp(`^${paint}`) }).first().click()
  await expect(shelf).toBeHidden()
}

/** Lays every pass the step asks for and goes on; a wait is left early, which is asked about and noted. */
async function doStep(page: Page) {
  const onAll = page.getByRole('button', { name: /^(One pass on|All passed|The others passed)/ })
  // A pass is shown once it is kept: the press may go while it is reached for.
  while (await onAll.isVisible()) await onAll.click({ timeout: 1_000 }).catch(() => undefined)
  const asked = page.getByRole('dialog')
  if (!await asked.isVisible()) await page.getByRole('button', { name: /^(Next|Finish the run)/ }).click({ timeout: 3000 })
  if (await asked.isVisible()) await asked.getByRole('button', { name: /noted with the run$/ }).click({ timeout: 3000 })
}

test('a painter builds a finish coat by coat, sees its colours, and publishes it', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/schemes')
  await page.getByRole('link', { name: 'Start a scheme' }).click()
  await page.getByLabel('Name', { exact: true }).fill(FINISH)
  await page.getByLabel(/^Fish/).fill('Gudgeon')
  await page.getByRole('button', { name: 'Start the scheme' }).click()
  await page.waitForURL(/\/schemes\/[0-9a-f-]{36}$/)
  schemeId = page.url().split('/').at(-1)!
  await expect(page.getByRole('heading', { name: FINISH })).toBeVisible()

  await lay(page, 'Olive green')
  const zones = page.getByRole('group', { name: 'Zones' })
  await zones.getByRole('button', { name: 'back', exact: true }).click()
  await zones.getByRole('button', { name: 'upper flank' }).click()
  await lay(page, 'Slow epoxy clear')
  await settle(page)
  // The colour of the back is told in words and figures, and the blank is painted.
  await expect(page.getByText(/lightness \d+, chroma \d+/).first()).toBeVisible()
  await expect(page.getByRole('img', { name: new RegExp(FINISH) }).first()).toBeVisible()

  await page.keyboard.press('Control+z')
  await settle(page)
  await page.keyboard.press('Control+Shift+z')
  await settle(page)

  await page.getByRole('button', { name: 'Publish revision 1' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel(/^Note/).fill(NOTE)
  await dialog.getByRole('button', { name: 'Publish revision 1' }).click()
  await expect(page.getByText('Revision 1 is published')).toBeVisible()
  expect(breaches).toEqual([])
  await page.context().close()
})

test('a bench painter follows it on two pieces to the end', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'bench', `/schemes/${schemeId}`)
  await page.getByRole('link', { name: 'Start a run' }).click()
  await page.getByRole('spinbutton', { name: 'Pieces' }).fill(String(PIECES))
  await page.getByRole('spinbutton', { name: 'Pieces' }).press('Tab')
  await page.getByRole('button', { name: 'Start the run' }).click()
  await page.waitForURL(/\/runs\/[0-9a-f-]{36}\/follow$/)

  const isOver = page.getByRole('link', { name: /See what was done/ })
  const rail = page.getByRole('img', { name: /^(Step \d+ of|All) \d+/ })
  const place = async () => await isOver.isVisible() ? 'over' : await rail.getAttribute('aria-label')
  for (let step = 0; step < 60 && !await isOver.isVisible(); step++) {
    const before = await place()
    await expect(async () => {
      await doStep(page)
      expect(await place()).not.toBe(before)
    }).toPass({ timeout: 20_000, intervals: [300] })
  }
  await isOver.click()
  await page.waitForURL(/\/runs\/[0-9a-f-]{36}$/)
  await expect(page.getByText(FINISH).first()).toBeVisible()
  expect(breaches).toEqual([])
  await page.context().close()
})

test('the front desk adds a camera photo, makes a card and shares it, and sees no recipe', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'desk', `/schemes/${schemeId}/photos`)
  await page.getByLabel('Photos from this device').setInputFiles({
    name: 'planted-file-name.jpg', mimeType: 'image/jpeg', buffer: await cameraPhoto({ width: 2400, height: 1600, orientation: 6 }),
  })
  await expect(page.getByRole('button', { name: /^See Photo 1 large/ })).toBeVisible({ timeout: 60_000 })
  await page.goto('/cards')
  await alive(page)
  await page.getByRole('button', { name: 'Start a card' }).click()
  const dialog = page.getByRole('dialog')
  await dialog.getByLabel('Finish').selectOption({ label: FINISH })
  await dialog.getByRole('button', { name: 'Start the card' }).click()
  await page.waitForURL(/\/cards\/[0-9a-f-]{36}$/)
  await page.getByRole('button', { name: /^Share/ }).first().click()
  await page.getByRole('dialog').getByRole('button', { name: 'Share it' }).click()
  link = await page.getByLabel('Its link').inputValue()
  expect(link).toMatch(/\/c\/[\w-]{32}$/)

  const recipe = await page.request.get(`/api/schemes/${schemeId}`)
  expect(recipe.status()).toBe(403)
  expect(breaches).toEqual([])
  await page.context().close()
})

test('a customer without an account or JavaScript sees the card and nothing of the recipe', async ({ browser }) => {
  const context = await browser.newContext({ javaScriptEnabled: false })
  const page = await context.newPage()
  await page.goto(link)
  await expect(page.getByRole('heading', { name: FINISH })).toBeVisible()
  const photo = page.locator('img').first()
  await expect(photo).toBeVisible()

  const html = await page.content()
  const secrets = [NOTE, 'Olive green', 'Slow epoxy', 'planted-file-name', 'reducer', schemeId, 'painter@', ...PLANTED]
  expect(secrets.filter(secret => html.includes(secret))).toEqual([])
  const source = await photo.evaluate((img: HTMLImageElement) => img.currentSrc || img.src).catch(() => photo.getAttribute('src'))
  const bytes = await (await page.request.get(String(source))).body()
  expect(await metadataIn([bytes])).toEqual([{}])
  await context.close()
})

test('a revoked card is gone for whoever has its link', async ({ browser }) => {
  const { page } = await enter(browser, 'desk', '/cards')
  const card = (await (await page.request.get(`/api/cards?schemeId=${schemeId}`)).json() as { id: string }[])[0]!
  const origin = new URL(page.url()).origin
  expect((await page.request.post(`/api/cards/${card.id}/revoke`, { data: {}, headers: { origin } })).status()).toBe(200)
  const gone = await page.request.get(link)
  expect(gone.status()).toBe(404)
  expect(await gone.text()).not.toContain(FINISH)
  await page.context().close()
})
