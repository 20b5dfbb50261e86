import AxeBuilder from '@axe-core/playwright'
import { type Page, expect, test } from '@playwright/test'
import { enter } from './sign-in'

/* The wall as a painter uses it: near a colour, a search that is kept, several put away at once and brought back, by the keyboard too. */
test.describe.configure({ mode: 'serial' })

const PAINTED = /, as it will look/

async function faultless(page: Page) {
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze()
  expect(violations.map(each => `${each.id}: ${each.nodes[0]?.html}`)).toEqual([])
}

async function narrow(page: Page, colour: string) {
  await page.getByRole('button', { name: /^Narrow the wall/ }).click()
  await page.getByLabel('Near this colour').fill(colour)
}

test('schemes come in the order of how near they are, and the search is kept under a name', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/schemes')
  await narrow(page, 'greenish')
  await page.getByLabel('Near this colour').blur()
  await expect(page.getByText(/This reads as no colour/)).toBeVisible()
  await page.getByLabel('Near this colour').fill('45 -20 30')
  await expect(page.getByText(/ΔE00 \d/).first()).toBeVisible()
  await faultless(page)
  await page.keyboard.press('Escape')
  await expect(page.getByText(/are being worked out/)).toBeHidden({ timeout: 60_000 })
  const distances = (await page.getByText(/ΔE00 \d/).allTextContents()).map(text => Number(/ΔE00 ([\d.]+)/.exec(text)?.[1]))
  expect(distances.length).toBeGreaterThan(1)
  expect(distances).toEqual([...distances].sort((one, other) => one - other))

  await page.getByRole('button', { name: 'Keep this search' }).click()
  await page.getByLabel('Name', { exact: true }).fill('Pond greens')
  await page.getByRole('button', { name: 'Keep it' }).click()
  await expect(page.getByRole('button', { name: 'Pond greens' })).toHaveAttribute('aria-pressed', 'true')
  await page.getByRole('button', { name: 'Pond greens' }).click()
  await expect(page.getByText(/ΔE00 \d/)).toHaveCount(0)
  await page.reload()
  await page.getByRole('button', { name: 'Pond greens' }).click()
  await expect(page.getByText(/ΔE00 \d/).first()).toBeVisible()
  await page.getByRole('button', { name: 'Forget this search' }).click()
  await expect(page.getByRole('button', { name: 'Pond greens' })).toBeHidden()
  expect(breaches).toEqual([])
  await page.context().close()
})

test('several are chosen by the keyboard, put away, named where they stay, and brought back', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/schemes')
  await page.getByRole('button', { name: 'Choose several' }).click()
  await expect(page.getByRole('checkbox').nth(3)).toBeVisible()
  const before = await page.getByRole('checkbox').count()
  await page.getByRole('checkbox').first().focus()
  await page.keyboard.press('Space')
  await page.keyboard.press('Shift+ArrowRight')
  await page.keyboard.press('Shift+ArrowRight')
  await expect(page.getByRole('checkbox', { checked: true })).toHaveCount(3)
  await faultless(page)
  await page.getByRole('button', { name: 'Put away 3' }).click()
  await expect(page.getByRole('button', { name: 'Choose several' })).toBeVisible()
  const stayed = await page.getByText(/ stays: a run of it goes on/).count()
  await expect(page.getByRole('link', { name: PAINTED })).toHaveCount(before - 3 + stayed)
  await page.getByRole('button', { name: 'Bring back' }).click()
  await expect(page.getByRole('link', { name: PAINTED })).toHaveCount(before)
  expect(breaches).toEqual([])
  await page.context().close()
})

for (const width of [390, 820]) {
  test(`at ${width} px nothing of the wall goes past the edge`, async ({ browser }) => {
    const { page } = await enter(browser, 'painter', '/schemes')
    await page.setViewportSize({ width, height: 860 })
    await narrow(page, 'olive')
    await expect(page.getByText(/ΔE00 \d/).first()).toBeVisible()
    await faultless(page)
    await page.keyboard.press('Escape')
    await page.getByRole('button', { name: 'Choose several' }).click()
    await faultless(page)
    expect(await page.evaluate(() => document.documentElement.scrollWidth <= window.innerWidth)).toBe(true)
    await page.context().close()
  })
}
