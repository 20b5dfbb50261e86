import { expect, type Page, test } from '@playwright/test'
import qrcode from 'qrcode'
import sharp from 'sharp'
import { type Gate, openGate } from './bench/gate'
import { actsAtServer, goToLay, openRun, startRunAs } from './bench/run-ground'
import { alive, demo, signIn } from './sign-in'

/* A day at the bench beside the painting itself: starting, noting, ringing, a full tablet, two tabs, a new version, looking back. */

const FINISH = 'Perch, evening water'
/** A one-pixel photo. */
const PIXEL = Buffer.from('iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAYAAAAfFcSJAAAADUlEQVR42mNk+M9QDwADhgGAWjR9awAAAABJRU5ErkJggg==', 'base64')

let gate: Gate
test.beforeEach(async () => {
  gate = await openGate(process.env.TEST_BASE_URL ?? '')
})
test.afterEach(async () => gate.close())

const header = (page: Page) => page.locator('header')
const ask = <T>(page: Page, path: string) => page.evaluate(async path => (await fetch(path)).json() as Promise<T>, path)

interface Bottle { id: string, code: string, paintId: string, paintName: string }

/** The demo's finish, with the paints of its first revision. */
async function finishOf(page: Page) {
  const { items } = await ask<{ items: { id: string, name: string }[] }>(page, '/api/schemes')
  const id = items.find(one => one.name === FINISH)!.id
  const { materials } = await ask<{ materials: { paints: { id: string, name: string }[] } }>(page, `/api/schemes/${id}/revisions/1`)
  return { id, paints: materials.paints }
}

/** A camera that sees one code on a card. */
async function holdBeforeCamera(page: Page, code: string) {
  const { size, data } = qrcode.create(code).modules
  await page.addInitScript(({ size, dots }) => {
    const canvas = document.createElement('canvas')
    canvas.width = canvas.height = (size + 8) * 8
    const pen = canvas.getContext('2d')!
    const draw = () => {
      pen.fillStyle = '#fff'
      pen.fillRect(0, 0, canvas.width, canvas.height)
      pen.fillStyle = '#000'
      dots.forEach((dot, n) => dot && pen.fillRect((n % size + 4) * 8, (Math.floor(n / size) + 4) * 8, 8, 8))
    }
    window.setInterval(draw, 50)
    Object.defineProperty(navigator, 'mediaDevices', { value: { getUserMedia: () => Promise.resolve(canvas.captureStream(20)) } })
  }, { size, dots: [...data] })
}

test('a run is started with named pieces, the air of the room and bottles by code, typed and before the camera', async ({ page }) => {
  await signIn(page, demo('painter'))
  const { id, paints } = await finishOf(page)
  const bottles = (await ask<Bottle[]>(page, '/api/bottles')).filter(bottle => paints.some(paint => paint.id === bottle.paintId))
  const [typed, seen] = [bottles[0]!, bottles.find(bottle => bottle.paintId !== bottles[0]!.paintId)!]
  await holdBeforeCamera(page, seen.code)
  await page.goto(`/runs/new?scheme=${id}&revision=1`)
  await alive(page)
  await page.getByRole('textbox', { name: 'Pieces' }).or(page.getByRole('spinbutton', { name: 'Pieces' })).first().fill('2')
  await page.getByLabel('Names of the pieces').fill('Left one\nRight one')
  await page.getByLabel('Room').fill('21,5')
  await page.getByLabel('Humidity').fill('48')

  const code = page.getByLabel('Code on a bottle')
  await code.fill('no such code')
  await page.getByRole('button', { name: 'Take this bottle' }).click()
  await expect(page.getByText('No bottle has the code no such code.')).toBeVisible()
  await code.fill(typed.code)
  await code.press('Enter')
  await expect(page.getByText(`${paints.find(paint => paint.id === typed.paintId)!.name}: `)).toBeVisible()
  await page.getByRole('button', { name: 'Read it with the camera' }).click()
  await expect(page.getByText(`${paints.find(paint => paint.id === seen.paintId)!.name}: `)).toBeVisible()
  await expect(page.getByRole('dialog')).toBeHidden()

  await page.getByRole('button', { name: 'Start the run' }).click()
  await expect(page.getByRole('heading', { level: 1, name: 'Make ready' })).toBeVisible()
  const run = await ask<{ names: string[], room: object, startBottles: Record<string, string>, pieces: number }>(page, `/api/runs/${page.url().split('/').at(-2)}`)
  expect(run).toMatchObject({ pieces: 2, names: ['Left one', 'Right one'], room: { celsius: 21.5, humidity: 48 }, startBottles: { [typed.paintId]: typed.id, [seen.paintId]: seen.id } })
})

test('what was done differently is noted with a photo without a network, and both arrive once', async ({ page }) => {
  const runId = await startRunAs(page, gate.url, 3)
  await openRun(page, gate.url, runId)
  await goToLay(page)
  gate.shut()
  await page.getByRole('button', { name: /differently/ }).click()
  await page.getByRole('button', { name: 'Two passes more' }).click()
  await page.getByRole('button', { name: 'Note it' }).click()
  await page.getByRole('button', { name: /differently/ }).click()
  await page.getByRole('button', { name: 'Photo', exact: true }).click()
  await page.locator('dialog[open] input[type=file]').setInputFiles({ name: 'belly.png', mimeType: 'image/png', buffer: PIXEL })
  await expect(page.getByRole('dialog')).toBeHidden()
  await expect(header(page)).toContainText('waiting')
  await page.reload()
  await expect(page.getByRole('heading', { level: 1, name: /^Lay coat/ })).toBeVisible()
  await expect(page.getByRole('button', { name: /^Piece 1, 2 of/ })).toBeVisible()
  gate.open()
  await expect(header(page)).toContainText('all handed over', { timeout: 60_000 })
  const acts = await actsAtServer(page, runId)
  const taken = acts.filter(each => each.act.kind === 'photo-taken') as unknown as { act: { photoId: string } }[]
  expect([taken.length, acts.filter(each => each.act.kind === 'deviation').length]).toEqual([1, 1])
  const run = await ask<{ scheme: { id: string } }>(page, `/api/runs/${runId}`)
  await expect.poll(async () => (await ask<{ id: string, run: { id: string } | null }[]>(page, `/api/schemes/${run.scheme.id}/photos`)).filter(photo => photo.run?.id === runId).map(photo => photo.id), { timeout: 40_000 })
    .toEqual([taken[0]!.act.photoId])
})

test('anything done can be taken back, whatever was done since', async ({ page }) => {
  const runId = await startRunAs(page, gate.url, 3)
  await openRun(page, gate.url, runId)
  await goToLay(page)
  for (const piece of [1, 2]) await page.getByRole('button', { name: new RegExp(`^Piece ${piece}, 0 of`) }).click()
  await expect(page.getByRole('button', { name: /^Piece 2, 1 of/ })).toBeVisible()
  await page.getByRole('button', { name: 'What was done so far' }).click()
  await page.getByRole('button', { name: /^Take back: 1 pass of coat 1 on piece 1/ }).click()
  await expect(page.getByRole('button', { name: /^Take back: 1 pass of coat 1 on piece 1/ })).toBeHidden()
  await page.keyboard.press('Escape')
  await expect(page.getByRole('button', { name: /^Piece 1, 0 of/ })).toBeVisible()
  await expect(page.getByRole('button', { name: /^Piece 2, 1 of/ })).toBeVisible()
})

test('a tablet that is full says so and counts nothing it did not keep; with room again it goes on', async ({ page }) => {
  await page.addInitScript(() => {
    const add = IDBObjectStore.prototype.add
    IDBObjectStore.prototype.add = function (...what: Parameters<typeof add>) {
      if ((window as { isFull?: boolean }).isFull) throw new DOMException('No room', 'QuotaExceededError')
      return add.apply(this, what)
    }
  })
  const runId = await startRunAs(page, gate.url, 3)
  await openRun(page, gate.url, runId)
  await goToLay(page)
  await page.evaluate('window.isFull = true')
  await page.getByRole('button', { name: /^Piece 1, 0 of/ }).click()
  await expect(page.getByRole('alert').filter({ hasText: 'storage of this tablet is full' })).toBeVisible()
  await expect(page.getByRole('button', { name: /^Piece 1, 0 of/ })).toBeVisible()
  await page.evaluate('window.isFull = false')
  await page.getByRole('button', { name: /^Piece 1, 0 of/ }).click()
  await expect(page.getByRole('button', { name: /^Piece 1, 1 of/ })).toBeVisible()
  await expect(page.getByRole('alert').filter({ hasText: 'storage of this tablet is full' })).toBeHidden()
})

test('a tablet that keeps nothing says so, and claims nothing', async ({ page }) => {
  const runId = await startRunAs(page, gate.url, 3)
  await page.addInitScript(() => {
    IDBFactory.prototype.open = () => {
      throw new DOMException('Not here', 'SecurityError')
    }
  })
  await page.goto(`${gate.url}/runs/${runId}/follow`)
  await expect(page.getByRole('alert').filter({ hasText: 'This tablet keeps nothing' })).toBeVisible()
  await expect(header(page)).not.toContainText('On this tablet')
})

test('two tabs on one tablet show the same, without a network too', async ({ page, context }) => {
  const runId = await startRunAs(page, gate.url, 3)
  await openRun(page, gate.url, runId)
  await goToLay(page)
  const other = await context.newPage()
  await openRun(other, gate.url, runId)
  await expect(other.getByRole('heading', { level: 1, name: /^Lay coat/ })).toBeVisible()
  gate.shut()
  await page.getByRole('button', { name: /^Piece 2, 0 of/ }).click()
  await expect(other.getByRole('button', { name: /^Piece 2, 1 of/ })).toBeVisible()
  await other.getByRole('button', { name: /^Piece 3, 0 of/ }).click()
  await expect(page.getByRole('button', { name: /^Piece 3, 1 of/ })).toBeVisible()
  gate.open()
  await expect(header(page)).toContainText('all handed over', { timeout: 60_000 })
  expect((await actsAtServer(page, runId)).filter(each => each.act.kind === 'pass-laid')).toHaveLength(2)
})

test('a timer goes on over a reload and rings by sound, shaking and picture until it was heard', async ({ page }) => {
  await page.addInitScript(() => {
    const turned = { both: 0 }
    const rung = { tones: 0, shakes: 0 }
    const [wall, running] = [Date.now.bind(Date), performance.now.bind(performance)]
    Date.now = () => wall() + turned.both
    performance.now = () => running() + turned.both
    const start = OscillatorNode.prototype.start
    OscillatorNode.prototype.start = function (when?: number) {
      rung.tones++
      return start.call(this, when)
    }
    navigator.vibrate = () => {
      rung.shakes++
      return true
    }
    Object.assign(window, { turned, rung })
  })
  const runId = await startRunAs(page, gate.url, 2)
  await openRun(page, gate.url, runId)
  await goToLay(page)
  const [onAll, timer] = [page.getByRole('button', { name: /^One pass on/ }), page.getByRole('timer').first()]
  await expect(async () => {
    if (await onAll.isVisible()) await onAll.click({ timeout: 2_000 })
    else await page.getByRole('button', { name: /^Next/ }).click({ timeout: 2_000 })
    await expect(timer).toBeVisible({ timeout: 500 })
  }).toPass({ intervals: [200] })
  const ends = await timer.getAttribute('data-ends-at')
  await page.reload()
  await expect(timer).toHaveAttribute('data-ends-at', ends!)
  // A browser lets a page sound only once it was touched.
  await page.getByRole('heading', { level: 1 }).first().click()
  expect(await page.evaluate('window.rung')).toEqual({ tones: 0, shakes: 0 })
  await page.evaluate('window.turned.both = 3 * 3_600_000')
  const picture = page.getByRole('alert').filter({ hasText: 'Over:' })
  await expect(picture).toBeVisible()
  const { tones, shakes } = await page.evaluate('window.rung') as { tones: number, shakes: number }
  expect([tones >= 3, shakes >= 1]).toEqual([true, true])
  await page.getByRole('button', { name: 'Heard' }).click()
  await expect(picture).toBeHidden()
})

test('a new version waits while a run is open anywhere on the tablet, and takes over afterwards', async ({ page, context }) => {
  const runId = await startRunAs(page, gate.url, 2)
  await openRun(page, gate.url, runId)
  await page.evaluate('window.isSamePage = true')
  // Another version of the worker lies ready.
  await page.evaluate(async () => {
    const registration = await navigator.serviceWorker.register('/worker.js?newer', { scope: '/' })
    await new Promise<void>((resolve) => {
      const look = () => registration.waiting ? resolve() : window.setTimeout(look, 100)
      look()
    })
  })
  const desk = await context.newPage()
  await desk.goto(`${gate.url}/runs`)
  await alive(desk)
  await desk.waitForTimeout(1_000)
  const lies = () => desk.evaluate(async () => Boolean((await navigator.serviceWorker.getRegistration('/'))?.waiting))
  await expect.poll(lies).toBe(true)
  expect(await page.evaluate('window.isSamePage')).toBe(true)
  await page.close()
  await desk.goto(`${gate.url}/runs`)
  await expect.poll(async () => lies().catch(() => true), { timeout: 30_000 }).toBe(false)
})

test('what the bench did is taken into the scheme by a press, and says what was taken', async ({ page }) => {
  const runId = await startRunAs(page, gate.url, 2)
  const run = await ask<{ body: { stack: { act: string, coat: { id: string } }[] } }>(page, `/api/runs/${runId}`)
  const coatId = run.body.stack.find(item => item.act === 'coat')!.coat.id
  await page.evaluate(({ runId, coatId }) => fetch(`/api/runs/${runId}/events`, { method: 'POST', headers: { 'content-type': 'application/json' }, body: JSON.stringify({ events: [
    { v: 1, kind: 'thinned', coatId, reducer: 13 }, { v: 1, kind: 'pass-laid', coatId, pieces: [1, 2], passes: 1 }, { v: 1, kind: 'step-done', stepId: `lay:${coatId}` },
  ].map(act => ({ id: crypto.randomUUID(), doneAt: new Date().toISOString(), act })) }) }), { runId, coatId })
  await page.context().clearCookies()
  await signIn(page, demo('painter'), `/runs/${runId}`)
  await page.getByRole('button', { name: 'Take what the bench did into the scheme' }).click()
  await expect(page.getByText(/Taken into the draft: .*13 drops of reducer/)).toBeVisible()
})

test('a piece is measured from a photo with a grey card, becomes the sample, and is withdrawn when it was wrong', async ({ page }) => {
  const runId = await startRunAs(page, gate.url, 2)
  await page.context().clearCookies()
  await signIn(page, demo('painter'), `/runs/${runId}`)
  // A grey card on the left, paint on the right.
  const half = (background: { r: number, g: number, b: number }) => sharp({ create: { width: 200, height: 200, channels: 3, background } }).png().toBuffer()
  const photo = await sharp({ create: { width: 400, height: 200, channels: 3, background: { r: 118, g: 118, b: 118 } } })
    .composite([{ input: await half({ r: 190, g: 90, b: 60 }), left: 200, top: 0 }]).jpeg({ quality: 95 }).toBuffer()
  const { scheme } = await ask<{ scheme: { id: string } }>(page, `/api/runs/${runId}`)
  await page.evaluate(async ({ path, bytes }) => {
    await fetch(path, { method: 'POST', headers: { 'content-type': 'application/octet-stream' }, body: Uint8Array.from(atob(bytes), letter => letter.charCodeAt(0)) })
  }, { path: `/api/schemes/${scheme.id}/photos?runId=${runId}`, bytes: photo.toString('base64') })
  await page.reload()
  await alive(page)
  await expect(page.getByText('A photo is only a guide').first()).toBeVisible()
  await page.getByRole('button', { name: 'Measure a piece from a photo' }).click()
  await page.getByLabel('Photo with a grey card').selectOption({ index: 1 })
  const probe = page.getByRole('application', { name: /^Photo: tap the grey card/ })
  await expect(probe).toBeVisible()
  // The photo has to be drawn before a colour can be taken from it.
  await expect(async () => {
    const card = await page.getByRole('application').boundingBox()
    await page.getByRole('application').click({ position: { x: card!.width * 0.25, y: card!.height / 2 } })
    await expect(page.getByText('Now tap the back.')).toBeVisible({ timeout: 500 })
  }).toPass()
  const back = page.getByRole('application', { name: /^Photo: tap the back/ })
  const box = await back.boundingBox()
  await back.click({ position: { x: box!.width * 0.75, y: box!.height / 2 } })
  await page.getByLabel('This piece is the sample of this finish').check()
  await page.getByRole('button', { name: 'Note these colours' }).click()

  const measure = page.getByRole('article').filter({ hasText: 'marked as the sample' })
  await expect(measure.getByRole('cell', { name: /^\d+\.\d$/ }).first()).toBeVisible()
  await expect(page.getByText(/The sample is piece 1 of run \d+, marked .* by Painter/)).toBeVisible()
  await measure.getByRole('button', { name: 'Withdraw this measure' }).click()
  await page.getByRole('dialog').getByRole('button', { name: 'Withdraw it' }).click()
  await expect(measure.getByText(/Withdrawn .* by Painter: nothing is held against it/)).toBeVisible()
  await expect(page.getByText('No piece is marked as the sample of this finish yet.')).toBeVisible()
})
