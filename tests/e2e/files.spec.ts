import { readFile, writeFile } from 'node:fs/promises'
import AxeBuilder from '@axe-core/playwright'
import { type Download, type Page, expect, test } from '@playwright/test'
import { alive, enter } from './sign-in'

/* What goes out of a workshop and comes in: a scheme as a file, the shelf as a table, coats laid again. */
const NAME = `Gudgeon ${crypto.randomUUID().slice(0, 6)}`

async function startScheme(page: Page) {
  await page.getByLabel('Name', { exact: true }).fill(NAME)
  await page.getByRole('button', { name: 'Start the scheme' }).click()
  await page.waitForURL(/\/schemes\/[0-9a-f-]{36}$/)
  await alive(page)
}

async function ways(page: Page, word: string) {
  await page.getByRole('button', { name: `More for ${NAME}` }).click()
  await page.getByRole('menuitem', { name: word }).click()
}

async function faults(page: Page) {
  const { violations } = await new AxeBuilder({ page }).include('dialog[open]').withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze()
  return violations.map(each => `${each.id}: ${each.nodes[0]?.html}`)
}

async function textOf(download: Download): Promise<string> {
  return readFile(await download.path(), 'utf8')
}

test('a scheme is taken out as a file and brought in again, after being told what that will do', async ({ browser }, info) => {
  const { page, breaches } = await enter(browser, 'painter', '/schemes/new')
  await startScheme(page)
  const [download] = await Promise.all([page.waitForEvent('download'), ways(page, 'Take it out as a file')])
  expect(download.suggestedFilename()).toMatch(/^gudgeon-[0-9a-f]{6}\.scheme\.json$/)
  const text = await textOf(download)
  const path = info.outputPath('carried.scheme.json')
  await writeFile(path, text.replaceAll(NAME, `${NAME} again`))
  const broken = info.outputPath('broken.scheme.json')
  await writeFile(broken, text.replace('"version": 1', '"version": 9'))

  await page.goto('/schemes')
  await alive(page)
  await page.getByRole('button', { name: 'Bring a scheme in' }).click()
  const dialog = page.getByRole('dialog', { name: 'Bring a scheme in' })
  await dialog.getByLabel('Scheme file').setInputFiles(broken)
  await expect(dialog.getByRole('alert')).toContainText('written by a newer workshop')
  await dialog.getByLabel('Scheme file').setInputFiles(path)
  await expect(dialog.getByText(`“${NAME} again”`)).toBeVisible()
  await expect(dialog.getByText('on the shelf already').first()).toBeVisible()
  expect(await faults(page)).toEqual([])
  await dialog.getByRole('button', { name: 'Bring it in' }).click()
  await page.waitForURL(/\/schemes\/[0-9a-f-]{36}$/)
  await expect(page.getByRole('heading', { name: `${NAME} again` })).toBeVisible()
  expect(breaches).toEqual([])
})

test('coats are saved as a build-up and laid again in another zone, in one step that can be undone', async ({ browser }) => {
  const { page, breaches } = await enter(browser, 'painter', '/schemes')
  await page.getByRole('link', { name: new RegExp(`${NAME}(?! again)`) }).first().click()
  await page.waitForURL(/\/schemes\/[0-9a-f-]{36}$/)
  await alive(page)
  await ways(page, 'Lay coats again, build-ups')
  const desk = page.getByRole('dialog', { name: 'Lay coats again' })
  await desk.getByRole('button', { name: 'Save them as a build-up' }).click()
  const save = page.getByRole('dialog', { name: 'Save a build-up' })
  await save.getByLabel('Name', { exact: true }).fill(`${NAME} base`)
  expect(await faults(page)).toEqual([])
  await save.getByRole('button', { name: 'Save it' }).click()
  await expect(save).toBeHidden()

  await ways(page, 'Lay coats again, build-ups')
  await desk.getByText('a build-up', { exact: true }).click()
  await desk.getByLabel('Build-up', { exact: true }).selectOption({ label: `${NAME} base` })
  await desk.getByText('other zones', { exact: true }).click()
  await desk.getByRole('button', { name: 'belly' }).click()
  expect(await faults(page)).toEqual([])
  await desk.getByRole('button', { name: 'Lay them' }).click()
  await expect(desk).toBeHidden()
  await expect(page.getByText('1 coat laid')).toBeVisible()
  expect(breaches).toEqual([])
})

test('the shelf goes out as a table, and a table comes in with each reject told by its row', async ({ browser }, info) => {
  const { page, breaches } = await enter(browser, 'painter', '/shelf')
  await page.getByRole('button', { name: 'As a file' }).click()
  const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('menuitem', { name: 'Take out, with decimal commas' }).click()])
  expect((await textOf(download)).startsWith('\uFEFFid;name;kind')).toBe(true)

  const path = info.outputPath('paints.csv')
  await writeFile(path, `name;kind;base;known_by;masstone;passes_to_hide;density_g_per_ml\r\n${NAME} tan;opaque;water;masstone-hide;66 8 30;4;1,08\r\nToo heavy;opaque;water;masstone-hide;66 8 30;4;9\r\n`)
  await page.getByRole('button', { name: 'As a file' }).click()
  await page.getByRole('menuitem', { name: 'Bring paints in' }).click()
  const dialog = page.getByRole('dialog', { name: 'Bring paints in' })
  await dialog.getByLabel('File of paints').setInputFiles(path)
  await expect(dialog.getByRole('status')).toContainText('1 paint to add, 0 to change, 0 as they are, 1 rejected')
  await expect(dialog.getByRole('row', { name: /^3 Too heavy rejected/ })).toContainText('density_g_per_ml')
  expect(await faults(page)).toEqual([])
  await dialog.getByRole('button', { name: 'Bring them in' }).click()
  await expect(dialog.getByRole('status')).toContainText('1 paint added')
  await dialog.getByRole('button', { name: 'Back to the shelf' }).click()
  await expect(page.getByRole('link', { name: `${NAME} tan` })).toBeVisible()
  expect(breaches).toEqual([])
})
