import { expect, it } from 'vitest'
import { pictureQueue } from '#server/pictures/picture-queue'

/** A picture that is finished when somebody says so. */
function drawing() {
  let [finish, count] = [(_: string) => {}, 0]
  const done = new Promise<string>((resolve) => {
    finish = resolve
  })
  return {
    draw: () => {
      count++
      return done
    },
    finish,
    count: () => count,
  }
}

it('draws a picture once for all who ask while it is under way, and anew afterwards', async () => {
  const queue = pictureQueue<string>({ all: 10, each: 10 })
  const one = drawing()
  const waiting = [1, 2, 3].map(() => queue.join('a', 'perch', one.draw))
  one.finish('painted')
  expect(await Promise.all(waiting)).toEqual(['painted', 'painted', 'painted'])
  expect(one.count()).toBe(1)
  await queue.join('a', 'perch', one.draw)
  expect(one.count()).toBe(2)
})

it('refuses at once what one workshop or all together ask too much of, and has room again when one is finished', async () => {
  const queue = pictureQueue<string>({ all: 3, each: 2 })
  const one = drawing()
  const refused = { data: { code: 'picture/too-many-waiting', retryAfterSeconds: 5 } }
  const running = [queue.join('a', '1', one.draw), queue.join('a', '2', one.draw)]
  await expect(queue.join('a', '3', one.draw)).rejects.toMatchObject(refused)
  running.push(queue.join('b', '3', one.draw))
  await expect(queue.join('c', '4', one.draw)).rejects.toMatchObject(refused)
  // Whoever asks for what is under way anyway takes no room.
  running.push(queue.join('a', '1', one.draw))
  one.finish('painted')
  await Promise.all(running)
  expect(await queue.join('c', '4', one.draw)).toBe('painted')
})

it('forgets a picture that failed', async () => {
  const queue = pictureQueue<string>({ all: 1, each: 1 })
  await expect(queue.join('a', '1', () => Promise.reject(new Error('no thread')))).rejects.toThrow('no thread')
  expect(await queue.join('a', '1', () => Promise.resolve('painted'))).toBe('painted')
})
