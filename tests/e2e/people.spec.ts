import AxeBuilder from '@axe-core/playwright'
import { type Page, expect, test } from '@playwright/test'
import { letterTo, tokenTo } from '../api/mailbox'
import { alive, breachesOf, demo, signIn } from './sign-in'

const PASSWORD = 'a roach on a wet stone'
const freshAddress = (who: string) => `${who}-${crypto.randomUUID().slice(0, 8)}@shore.example`

async function openWorkshop(page: Page, email: string, name: string) {
  await page.goto('/sign-up')
  await alive(page)
  await page.getByLabel('Your e-mail').fill(email)
  await page.getByRole('button', { name: 'Send me the link' }).click()
  await expect(page.getByText(`To ${email}`)).toBeVisible()
  await page.goto(`/sign-up/${await tokenTo(email)}`)
  await alive(page)
  await page.getByLabel('Name of the workshop').fill(name)
  await page.getByLabel('Your name').fill('Runa')
  await page.getByLabel('Choose a password').fill(PASSWORD)
  await page.getByRole('button', { name: 'Open the workshop' }).click()
  await page.waitForURL('**/schemes')
}

test('whoever is signed out is asked who they are, and comes to the page they wanted', async ({ page }) => {
  const breaches = breachesOf(page)
  const owner = demo('owner')
  await page.goto('/workshop')
  await alive(page)
  await expect(page).toHaveURL(/\/sign-in\?back=/)
  await page.getByLabel('E-mail').fill(owner.email)
  await page.getByLabel('Password').fill('not this one')
  await page.getByRole('button', { name: 'Sign in' }).click()
  await expect(page.getByRole('alert')).toContainText('do not fit together')
  await page.getByLabel('Password').fill(owner.password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL('**/workshop')
  await expect(page.getByRole('heading', { name: 'People' })).toBeVisible()
  expect(breaches).toEqual([])
})

test('whoever is signed in passes the door by, and finds their own page from the back by keyboard, on a phone too', async ({ page }) => {
  await signIn(page, demo('painter'))
  await expect(page.getByRole('heading', { name: 'People' })).toBeVisible()
  await page.goto('/sign-in?back=/blanks')
  await alive(page)
  await expect(page).toHaveURL(/\/blanks$/)
  await page.setViewportSize({ width: 390, height: 844 })
  await expect(async () => {
    await page.getByRole('button', { name: 'You' }).press('Enter')
    await expect(page.getByRole('link', { name: 'Your own page' })).toBeVisible({ timeout: 500 })
  }).toPass()
  await page.keyboard.press('Escape')
  await expect(page.getByRole('button', { name: 'You' })).toBeFocused()
  await page.keyboard.press('Enter')
  await page.keyboard.press('Tab')
  await page.keyboard.press('Enter')
  await page.waitForURL('**/me')
  await expect(page.getByRole('link', { name: 'Your own page' })).toBeHidden()
})

test('a workshop is opened by letter, somebody is asked in, and is out at once when taken out', async ({ page, browser }) => {
  const breaches = breachesOf(page)
  const guest = freshAddress('guest')
  await openWorkshop(page, freshAddress('owner'), 'Runa on the shore')
  await page.goto('/workshop')
  await alive(page)
  await page.getByLabel('E-mail').fill(guest)
  await page.getByRole('button', { name: 'Invite' }).click()
  await expect(page.getByRole('cell', { name: guest, exact: true })).toBeVisible()
  expect((await letterTo(guest)).subject).toBe('Runa on the shore asks you in')

  const elsewhere = await browser.newContext({ baseURL: process.env.TEST_BASE_URL })
  const guestPage = await elsewhere.newPage()
  await guestPage.goto(`/invite/${await tokenTo(guest)}`)
  await alive(guestPage)
  await guestPage.getByLabel('Your name').fill('Stellan')
  await guestPage.getByLabel('Choose a password').fill(PASSWORD)
  await guestPage.getByRole('button', { name: 'Come in' }).click()
  await guestPage.waitForURL('**/schemes')
  await guestPage.goto('/workshop')
  await expect(guestPage.getByRole('button', { name: 'Invite' })).toHaveCount(0)

  await page.reload()
  await page.getByRole('button', { name: 'Take out Stellan' }).click()
  await page.getByRole('dialog').getByRole('button', { name: 'Take out' }).click()
  await expect(page.getByRole('cell', { name: 'Stellan' })).toHaveCount(0)
  await guestPage.goto('/workshop')
  await expect(guestPage).toHaveURL(/\/sign-in/)
  await elsewhere.close()
  expect(breaches).toEqual([])
})

test('the door and the pages of people have no fault that axe can find, light and dark', async ({ page }) => {
  await signIn(page, demo('owner'))
  for (const colorScheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme })
    for (const path of ['/workshop', '/me', '/sign-in', '/sign-up', '/forgot']) {
      await page.goto(path)
      await alive(page)
      await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
      const { violations } = await new AxeBuilder({ page }).analyze()
      expect(violations.map(one => `${path} ${colorScheme}: ${one.id} ${one.nodes.map(node => node.target.join(' ')).join(', ')}`)).toEqual([])
    }
  }
})
