import { expect, type Page } from '@playwright/test'
import { demo } from '../sign-in'

/** The demo's finish with flakes and masks, which is painted in these tests. */
const FINISH = 'Perch, evening water'

interface Named { id: string, name: string, headNumber: number }
/** An act as the server shows it. */
export interface ShownAct { id: string, act: { kind: string, pieces?: number[], passes?: number } }

/** Signs the bench painter in and starts a run; answers its id. */
export async function startRunAs(page: Page, base: string, pieces: number): Promise<string> {
  const { email, password } = demo('bench')
  await page.goto(`${base}/manifest.webmanifest`)
  return page.evaluate(async ({ email, password, pieces, finish }) => {
    const post = async (path: string, body: unknown) => (await fetch(path, { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) })).json()
    await post('/api/sign-in', { email, password })
    const { items } = await (await fetch('/api/schemes')).json() as { items: Named[] }
    const scheme = items.find(one => one.name === finish)
    if (!scheme) throw new Error('The demo has no such finish')
    return (await post('/api/runs', { schemeId: scheme.id, revision: 1, pieces }) as { id: string }).id
  }, { email, password, pieces, finish: FINISH })
}

/** Opens a run at the bench and waits until all of it lies on the tablet. */
export async function openRun(page: Page, base: string, runId: string): Promise<void> {
  await page.goto(`${base}/runs/${runId}/follow`)
  await expect(page.locator('header')).toContainText('On this tablet', { timeout: 60_000 })
}

/** What the server holds of a run. */
export async function actsAtServer(page: Page, runId: string): Promise<ShownAct[]> {
  return page.evaluate(async id => ((await (await fetch(`/api/runs/${id}/events?since=0`)).json()) as { events: ShownAct[] }).events, runId)
}

/** Goes on from step to step until a coat is to be laid. */
export async function goToLay(page: Page): Promise<void> {
  const lay = page.getByRole('heading', { level: 1, name: /^Lay coat/ })
  const title = page.getByRole('heading', { level: 1 }).first()
  for (let step = 0; step < 12 && !await lay.isVisible(); step++) {
    const before = await title.textContent()
    await expect(async () => {
      // What was pressed is shown once it is kept: nobody presses again meanwhile.
      if (await title.textContent() === before) await page.getByRole('button', { name: /^Next/ }).click({ timeout: 2_000 })
      const early = page.getByRole('dialog').getByRole('button', { name: /noted with the run$/ })
      if (await early.isVisible()) await early.click({ timeout: 2_000 })
      await expect(title).not.toHaveText(before ?? '', { timeout: 3_000 })
    }).toPass()
  }
  await expect(lay).toBeVisible()
}
