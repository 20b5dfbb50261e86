import { drizzle } from 'drizzle-orm/node-postgres'
import { migrate } from 'drizzle-orm/node-postgres/migrator'
import { Client } from 'pg'
import type { TestProject } from 'vitest/node'
import { startThrowAwayMailbox } from './throw-away-mailbox'
import { startThrowAwayPostgres } from './throw-away-postgres'

/**
 * The ground of all API tests: a PostgreSQL with a migrated template that each test file clones, and a mailbox.
 * Those named in the environment (TEST_PG_ADMIN_URL, TEST_SMTP_URL with TEST_MAIL_DIR) are used; missing ones are started and thrown away.
 */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const endings: (() => Promise<void>)[] = []
  const pgAdminUrl = process.env.TEST_PG_ADMIN_URL ?? await started(endings, startThrowAwayPostgres, it => it.adminUrl)
  if (process.env.TEST_SMTP_URL === undefined || process.env.TEST_MAIL_DIR === undefined) {
    await started(endings, startThrowAwayMailbox, (it) => {
      process.env.TEST_SMTP_URL = it.url
      process.env.TEST_MAIL_DIR = it.dir
    })
  }
  const template = `template_${crypto.randomUUID().replaceAll('-', '')}`
  await makeTemplate(pgAdminUrl, template)
  endings.push(() => onDatabase(pgAdminUrl, 'postgres', client => client.query(`drop database "${template}" with (force)`)))

  project.provide('pgAdminUrl', pgAdminUrl)
  project.provide('templateDatabase', template)
  Object.assign(process.env, serverEnvironment(pgAdminUrl))
  return async () => {
    for (const end of endings.reverse()) await end()
  }
}

/** What services and servers of the tests find in their environment. The store is there when TEST_S3_ENDPOINT is. */
function serverEnvironment(databaseUrl: string): Record<string, string> {
  return {
    DATABASE_URL: databaseUrl,
    PUBLIC_URL: 'http://127.0.0.1:3000',
    SESSION_PASSWORD: 'only for tests, and long enough for them',
    SMTP_URL: process.env.TEST_SMTP_URL ?? '',
    MAIL_FROM: 'Countershade <countershade@bench.example>',
    S3_ENDPOINT: process.env.TEST_S3_ENDPOINT ?? 'http://127.0.0.1:9',
    S3_BUCKET: process.env.TEST_S3_BUCKET ?? 'countershade-test',
    S3_REGION: process.env.TEST_S3_REGION ?? 'local',
    S3_ACCESS_KEY_ID: process.env.TEST_S3_ACCESS_KEY_ID ?? 'test',
    S3_SECRET_ACCESS_KEY: process.env.TEST_S3_SECRET_ACCESS_KEY ?? 'test',
  }
}

async function started<S extends { stop: () => Promise<void> }, T>(
  endings: (() => Promise<void>)[], start: () => Promise<S>, use: (it: S) => T,
): Promise<T> {
  const it = await start()
  endings.push(it.stop)
  return use(it)
}

async function makeTemplate(adminUrl: string, name: string): Promise<void> {
  await onDatabase(adminUrl, 'postgres', client => client.query(`create database "${name}"`))
  await onDatabase(adminUrl, name, client => migrate(drizzle(client), { migrationsFolder: 'drizzle' }))
}

async function onDatabase(adminUrl: string, name: string, work: (client: Client) => Promise<unknown>): Promise<void> {
  const url = new URL(adminUrl)
  url.pathname = `/${name}`
  const client = new Client({ connectionString: url.href })
  await client.connect()
  try {
    await work(client)
  }
  finally {
    await client.end()
  }
}
