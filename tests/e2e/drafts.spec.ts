import AxeBuilder from '@axe-core/playwright'
import { type Page, expect, test } from '@playwright/test'
import { alive, enter } from './sign-in'

/*
 * Nothing of a draft is lost: not when a tab is killed, not after a reload, and not when two people work on one.
 */
interface Draft { id: string, draft: { stack: { act: string, coat?: { id: string, passes: number, rest: number, note: string, name: string } }[] } }

/** Starts a scheme of its own with the paint a scheme begins with, and opens it. */
async function started(page: Page): Promise<string> {
  const origin = new URL(page.url()).origin
  const [blank] = await (await page.request.get('/api/blanks')).json() as { id: string }[]
  const made = await page.request.post('/api/schemes', { data: { name: `Bleak ${crypto.randomUUID().slice(0, 6)}`, blankId: blank!.id }, headers: { origin } })
  expect(made.status()).toBe(201)
  return (await made.json() as Draft).id
}

async function open(page: Page, schemeId: string) {
  await page.goto(`/schemes/${schemeId}`)
  await alive(page)
  await expect(page.getByLabel('What to watch')).toBeVisible()
}

async function coats(page: Page, schemeId: string) {
  const { draft } = await (await page.request.get(`/api/schemes/${schemeId}`)).json() as Draft
  return draft.stack.flatMap(item => item.coat ?? [])
}

const passes = (page: Page) => page.getByRole('region', { name: 'Coat sheet' }).getByRole('spinbutton', { name: 'Passes', exact: true })
async function setPasses(page: Page, count: number) {
  await passes(page).fill(String(count))
  await passes(page).press('Tab')
}
const saved = (page: Page) => expect(page.getByText(/^Saved/)).toBeVisible()

test('what was typed a second before the tab was killed is there in the next one, and is saved', async ({ browser }) => {
  const { page } = await enter(browser, 'painter', '/schemes')
  const schemeId = await started(page)
  await open(page, schemeId)
  // Nothing reaches the server: it has to come back from this device.
  await page.route(/\/draft$/, route => route.abort())
  await page.getByLabel('What to watch').pressSequentially('thin at the gill', { delay: 20 })
  await page.waitForTimeout(1000)
  await page.goto('chrome://crash', { timeout: 5000 }).catch(() => undefined)

  const next = await page.context().newPage()
  await open(next, schemeId)
  await expect(next.getByLabel('What to watch')).toHaveValue('thin at the gill')
  await saved(next)
  expect((await coats(next, schemeId)).at(-1)?.note).toBe('thin at the gill')
  await page.context().close()
})

test('without a network it says that the draft is on this device, and only the server makes it saved', async ({ browser }) => {
  const { page } = await enter(browser, 'painter', '/schemes')
  const schemeId = await started(page)
  await open(page, schemeId)
  await page.context().setOffline(true)
  await setPasses(page, 8)
  await expect(page.getByText(/kept on this device/)).toBeVisible()
  await page.context().setOffline(false)
  await saved(page)
  expect((await coats(page, schemeId)).at(-1)?.passes).toBe(8)
  await page.context().close()
})

test('what was done before a reload is undone after it, step by step, and done again', async ({ browser }) => {
  const { page } = await enter(browser, 'painter', '/schemes')
  const schemeId = await started(page)
  await open(page, schemeId)
  const before = await coats(page, schemeId)
  const name = page.getByLabel(/^Name of coat/)
  await setPasses(page, 7)
  await name.fill('silver')
  await setPasses(page, 9)
  await saved(page)
  const after = await coats(page, schemeId)
  expect(after.at(-1)).toMatchObject({ passes: 9, name: 'silver' })

  await page.reload()
  await alive(page)
  await expect(page.getByRole('button', { name: /^Undo: Passes/ })).toBeEnabled()
  for (let step = 0; step < 3; step++) await page.keyboard.press('Control+z')
  await saved(page)
  await expect.poll(() => coats(page, schemeId)).toEqual(before)
  for (let step = 0; step < 3; step++) await page.keyboard.press('Control+Shift+z')
  await expect.poll(() => coats(page, schemeId)).toEqual(after)
  await page.context().close()
})

test('two people see each other, keep their work on different coats, and choose where both changed one', async ({ browser }) => {
  const { page: ann } = await enter(browser, 'painter', '/schemes')
  const schemeId = await started(ann)
  await open(ann, schemeId)
  const { page: ben, breaches } = await enter(browser, 'owner', `/schemes/${schemeId}`)
  await open(ben, schemeId)
  await expect(ann.getByText(/is here, on coat 1$/)).toBeVisible()
  await expect(ben.getByText(/is here, on coat 1$/)).toBeVisible()

  // What one saves comes in at the other by itself.
  await ann.getByLabel('What to watch').fill('from Ann')
  await expect(ben.getByLabel('What to watch')).toHaveValue('from Ann')

  await ben.context().setOffline(true)
  await expect(ann.getByText(/is here/)).toBeHidden()
  await setPasses(ben, 9)
  await expect(ben.getByText(/kept on this device/)).toBeVisible()
  await setPasses(ann, 4)
  await saved(ann)
  await ben.context().setOffline(false)

  const dialog = ben.getByRole('dialog', { name: 'Both of you changed the same' })
  await expect(dialog).toBeVisible()
  await expect(dialog.getByRole('group', { name: /^Coat 1/ })).toContainText('Passes: 9')
  await expect(dialog.getByRole('button', { name: 'Go on with this' })).toHaveAccessibleDescription(/^Choose for coat 1/)
  const { violations } = await new AxeBuilder({ page: ben }).include('dialog[open]').withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze()
  expect(violations.map(each => `${each.id}: ${each.nodes[0]?.html}`)).toEqual([])
  expect((await coats(ann, schemeId)).at(-1)?.passes).toBe(4)

  // By keyboard alone.
  await dialog.getByRole('radio', { name: /^Yours/ }).focus()
  await ben.keyboard.press('Space')
  await dialog.getByRole('button', { name: 'Go on with this' }).focus()
  await ben.keyboard.press('Enter')
  await expect(dialog).toBeHidden()
  await saved(ben)
  expect((await coats(ann, schemeId)).at(-1)).toMatchObject({ passes: 9, note: 'from Ann' })
  await ben.keyboard.press('Control+z')
  await expect.poll(async () => (await coats(ann, schemeId)).at(-1)?.passes).toBe(4)

  await ben.context().close()
  await expect(ann.getByText(/is here/)).toBeHidden()
  expect(breaches.filter(breach => !/Failed to fetch|network/i.test(breach))).toEqual([])
  await ann.context().close()
})
