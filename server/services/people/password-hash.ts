import { type ScryptOptions, randomBytes, scrypt, timingSafeEqual } from 'node:crypto'

/** Cost of one guess: 32 MiB of memory, three times over, as OWASP's Password Storage Cheat Sheet gives for scrypt. */
const COST = { N: 2 ** 15, r: 8, p: 3 } as const
const KEY_BYTES = 32

/** A password as it is kept: `scrypt$N$r$p$salt$key`, with the cost it was made at. */
export async function hashPassword(password: string): Promise<string> {
  const salt = randomBytes(16)
  const key = await derive(password, salt, COST)
  return ['scrypt', COST.N, COST.r, COST.p, salt.toString('base64url'), key.toString('base64url')].join('$')
}

/** Whether a password is the one kept. With nothing kept it takes as long and is false, so that the time tells nobody who has an account. */
export async function passwordFits(password: string, kept: string | undefined): Promise<boolean> {
  const [scheme, N, r, p, salt, key] = (kept ?? '').split('$')
  if (scheme !== 'scrypt' || !salt || !key) {
    await derive(password, Buffer.alloc(16), COST)
    return false
  }
  const expected = Buffer.from(key, 'base64url')
  const actual = await derive(password, Buffer.from(salt, 'base64url'), { N: Number(N), r: Number(r), p: Number(p) })
  return expected.length === actual.length && timingSafeEqual(expected, actual)
}

function derive(password: string, salt: Buffer, cost: { N: number, r: number, p: number }): Promise<Buffer> {
  const options: ScryptOptions = { ...cost, maxmem: 256 * cost.N * cost.r }
  return new Promise((resolve, reject) => {
    // The same word typed on two keyboards can differ in its code points.
    scrypt(password.normalize('NFKC'), salt, KEY_BYTES, options, (error, key) => error ? reject(error) : resolve(key))
  })
}
