import { z } from 'zod'

/** Shortest password that may seal session cookies, in characters. */
export const SESSION_PASSWORD_MIN = 32

const BUCKET = /^[a-z0-9][a-z0-9.-]{1,61}[a-z0-9]$/

/** The environment as the server finds it; the start scripts fill in what the local services answer to. */
export const Environment = z.object({
  PORT: z.coerce.number().int().min(1).max(65_535).default(3000),
  HOST: z.string().min(1).default('127.0.0.1'),
  DATA_DIR: z.string().min(1).default('.data'),
  DATABASE_URL: z.url({ protocol: /^postgres(ql)?$/ }),
  S3_ENDPOINT: z.url({ protocol: /^https?$/ }),
  S3_BUCKET: z.string().regex(BUCKET, 'a bucket name has 3 to 63 lower-case letters, digits, dots or hyphens'),
  S3_REGION: z.string().min(1),
  S3_ACCESS_KEY_ID: z.string().min(1),
  S3_SECRET_ACCESS_KEY: z.string().min(1),
  SMTP_URL: z.url({ protocol: /^smtps?$/ }),
  MAIL_FROM: z.string().regex(/^[^\r\n]*[^\s@<]+@[^\s@>]+>?$/, 'an address, or a name and an address in angle brackets'),
  PUBLIC_URL: z.url({ protocol: /^https?$/ }),
  SESSION_PASSWORD: z.string().min(SESSION_PASSWORD_MIN),
})

/** What the server was told about the world around it. */
export const Settings = Environment.transform(env => ({
  port: env.PORT,
  host: env.HOST,
  /** Folder for whatever this server keeps beside the database and the photo store. */
  dataDir: env.DATA_DIR,
  /** The role that owns no table, so that row-level security holds for it. */
  databaseUrl: env.DATABASE_URL,
  /** Where people reach the workshop, without a slash at the end. */
  publicUrl: env.PUBLIC_URL.replace(/\/+$/, ''),
  sessionPassword: env.SESSION_PASSWORD,
  photos: Object.freeze({
    endpoint: env.S3_ENDPOINT,
    bucket: env.S3_BUCKET,
    region: env.S3_REGION,
    accessKeyId: env.S3_ACCESS_KEY_ID,
    secretAccessKey: env.S3_SECRET_ACCESS_KEY,
  }),
  mail: Object.freeze({ url: env.SMTP_URL, from: env.MAIL_FROM }),
}))
export type Settings = Readonly<z.output<typeof Settings>>

/** Where photos are kept, and the key to it. */
export type PhotoSettings = Settings['photos']

/** Which server takes our mail, and who it is from. */
export type MailSettings = Settings['mail']

/** Reads settings out of an environment; a wrong one stops with its name and what it should be, never its value. */
export function readSettings(raw: unknown): Settings {
  const parsed = Settings.safeParse(raw)
  if (!parsed.success) throw new Error(`Wrong settings:\n${z.prettifyError(parsed.error)}`)
  return Object.freeze(parsed.data)
}

let current: Settings | undefined

/** The settings this server runs with, read from its environment once. */
export function settings(): Settings {
  current ??= readSettings(process.env)
  return current
}
