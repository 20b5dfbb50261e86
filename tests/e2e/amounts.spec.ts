import AxeBuilder from '@axe-core/playwright'
import { type Browser, type Page, expect, test } from '@playwright/test'
import { alive, enter } from './sign-in'

/* How much for so many pieces, as a painter asks it: mixes that do not set in the cup, weight, cost, in the workshop's units. */
test.describe.configure({ mode: 'serial' })

const FINISH = `Bleak ${crypto.randomUUID().slice(0, 6)}`
let scheme = ''

async function lay(page: Page, paint: string) {
  await page.getByRole('button', { name: 'Coat above' }).first().click()
  const shelf = page.getByRole('dialog')
  await shelf.getByLabel('Look for a paint').fill(paint)
  await shelf.getByRole('button', { name: new RegExp(`^${paint}`) }).first().click()
  await expect(shelf).toBeHidden()
}

async function openAmounts(page: Page) {
  await page.getByRole('button', { name: /how it is worked out$/ }).first().click()
  const dialog = page.getByRole('dialog', { name: 'Amounts' })
  await expect(dialog).toBeVisible()
  return dialog
}

async function type(page: Page, name: string, text: string) {
  const field = page.getByRole('spinbutton', { name, exact: true })
  await field.fill(text)
  await field.blur()
}

async function faults(page: Page) {
  const { violations } = await new AxeBuilder({ page }).include('dialog[open]').withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze()
  return violations.map(each => `${each.id}: ${each.nodes[0]?.html}`)
}

/** What the demo workshop measures in, set by its owner. */
async function measureIn(browser: Browser, change: object) {
  const { page } = await enter(browser, 'owner', '/schemes')
  const { session } = await (await page.request.get('/api/session')).json() as { session: { workshop: { id: string } } }
  const answer = await page.request.patch(`/api/workshops/${session.workshop.id}`, { data: change, headers: { origin: new URL(page.url()).origin } })
  expect(answer.status()).toBe(200)
  await page.context().close()
}

test('more pieces and a warmer room make more mixes of the clear, and every figure says what it was worked out from', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/blanks')
  const { origin } = new URL(page.url())
  const [blank] = await (await page.request.get('/api/blanks')).json() as { id: string }[]
  const begun = await page.request.post('/api/schemes', { data: { name: FINISH, fish: 'Bleak', blankId: blank!.id }, headers: { origin } })
  scheme = `/schemes/${(await begun.json() as { id: string }).id}`
  await page.goto(scheme)
  await alive(page)
  await lay(page, 'Opaque white')
  await lay(page, 'Slow epoxy clear')

  const dialog = await openAmounts(page)
  await type(page, 'Pieces', '24')
  const clear = dialog.locator('details', { hasText: /^\d+\s*Slow epoxy clear/ })
  const words = clear.getByText(/At 21 °C a mix lasts about 33 min/)
  await expect(words).toBeVisible()
  const mixes = async () => Number(/(\d+) mixes/.exec(await clear.locator('summary').innerText())?.[1])
  const cool = await mixes()
  expect(cool).toBeGreaterThan(1)
  await expect(clear.getByText(/resin \+ hardener: .* by volume, or .* by weight/).first()).toBeVisible()
  await expect(clear.getByText('N · A · d · c / (s · t) · (1 + r) + M · l')).toBeVisible()
  await expect(clear.getByText(/M = \d+ \(mixes\); l = 0.75 mL \(left in cup and lines\)/)).toBeVisible()

  await dialog.getByText('Planning values', { exact: true }).click()
  await type(page, 'The room', '86 °F')
  await expect(clear.getByText(/At 30 °C a mix lasts about 18 min/)).toBeVisible()
  expect(await mixes()).toBeGreaterThan(cool)
  await dialog.getByText('Area by zone').click()
  await expect(dialog.getByRole('row', { name: /^Upper flank/ })).toBeVisible()
  await expect(dialog.getByText('Cost of its paint')).toBeVisible()
  await expect(dialog.getByText(/It floats .* less for it/)).toBeVisible()
  expect(await faults(page)).toEqual([])

  // Kept on the device, for the next time one asks.
  await page.reload()
  await alive(page)
  await expect((await openAmounts(page)).getByText('Planning values, your own')).toBeVisible()
  expect(breaches).toEqual([])
  await page.context().close()
})

test('what was typed in psi is psi again where psi are shown, and the amounts turn to ounces', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', scheme)
  await page.getByRole('button', { name: /Opaque white/ }).first().click()
  await type(page, 'Pressure with air flowing, bar', '13 psi')
  await expect(page.getByRole('spinbutton', { name: 'Pressure with air flowing, bar' })).toHaveValue('0.9')
  await expect(page.getByText(/^Saved/)).toBeVisible()
  await measureIn(browser, { units: 'inch' })
  try {
    await page.reload()
    await alive(page)
    await page.getByRole('button', { name: /Opaque white/ }).first().click()
    await expect(page.getByRole('spinbutton', { name: 'Pressure with air flowing, psi' })).toHaveValue('13')
    await expect(page.getByRole('spinbutton', { name: 'Distance, in' })).toBeVisible()
    const dialog = await openAmounts(page)
    await dialog.getByText('Area by zone').click()
    await expect(dialog.getByRole('row', { name: /^Upper flank .*in²/ })).toBeVisible()
    await expect(dialog.getByRole('region', { name: 'From the bottles' }).getByText('fl oz').first()).toBeVisible()
    await page.setViewportSize({ width: 390, height: 844 })
    expect(await dialog.evaluate(box => box.scrollWidth - box.clientWidth)).toBeLessThanOrEqual(0)
    expect(await faults(page)).toEqual([])
  }
  finally {
    await measureIn(browser, { units: 'metric' })
  }
  expect(breaches).toEqual([])
  await page.context().close()
})

test('the bench asks how much, and sees no cost', async ({ browser }) => {
  const { page } = await enter(browser, 'bench', scheme)
  await page.getByRole('region', { name: 'Coat sheet' }).getByRole('button', { name: /^More for / }).click()
  await page.getByRole('menuitem', { name: 'Amounts' }).click()
  const dialog = page.getByRole('dialog', { name: 'Amounts' })
  await expect(dialog.getByText('From the bottles')).toBeVisible()
  await expect(dialog.getByText(/cost/i)).toHaveCount(0)
  await page.context().close()
})
