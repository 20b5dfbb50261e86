import { Client } from 'pg'
import type { TestProject } from 'vitest/node'
import { openTestServices } from '../../scripts/lib/test-env.mjs'
import { Closing } from '../../scripts/lib/until-stopped.mjs'
import { openLocalDatabase } from '../../scripts/lib/workshop-data.mjs'

/**
 * The ground of all API tests: a PostgreSQL with a migrated template that each test file clones, a photo store and a
 * mailbox. Those named in the environment (see scripts/lib/test-env.mjs) are used; without them they are started for this run.
 */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const closing = new Closing()
  if (process.env.TEST_PG_ADMIN_URL === undefined) Object.assign(process.env, (await openTestServices(closing)).env)
  const adminUrl = named('TEST_PG_ADMIN_URL')
  const template = `template_${crypto.randomUUID().replaceAll('-', '')}`
  const { databaseUrl } = await openLocalDatabase(adminUrl, template)
  await closing.add('The template database', () => dropDatabase(adminUrl, template))

  project.provide('pgAdminUrl', adminUrl)
  project.provide('templateDatabase', template)
  Object.assign(process.env, serverEnvironment(databaseUrl))
  return () => closing.close()
}

/** What services and servers of the tests find in their environment; each server gets a database and an address of its own. */
function serverEnvironment(databaseUrl: string): Record<string, string> {
  return {
    DATABASE_URL: databaseUrl,
    PUBLIC_URL: 'http://127.0.0.1:3000',
    SESSION_PASSWORD: 'only for tests, and long enough for them',
    SMTP_URL: named('TEST_SMTP_URL'),
    MAIL_FROM: 'Countershade <countershade@bench.example>',
    S3_ENDPOINT: named('TEST_S3_ENDPOINT'),
    S3_BUCKET: named('TEST_S3_BUCKET'),
    S3_REGION: named('TEST_S3_REGION'),
    S3_ACCESS_KEY_ID: named('TEST_S3_ACCESS_KEY_ID'),
    S3_SECRET_ACCESS_KEY: named('TEST_S3_SECRET_ACCESS_KEY'),
  }
}

function named(name: string): string {
  const value = process.env[name]
  if (!value) throw new Error(`${name} is not set, though TEST_PG_ADMIN_URL is: set all of them or none.`)
  return value
}

async function dropDatabase(adminUrl: string, name: string): Promise<void> {
  const client = new Client({ connectionString: adminUrl })
  await client.connect()
  await client.query(`drop database "${name}" with (force)`)
  await client.end()
}
