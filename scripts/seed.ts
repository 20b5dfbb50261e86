// Fills an empty database with the demo workshop and writes its sign-ins down. The start script runs it with the server's environment.
import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { closeDatabase, database } from '#server/db/client'
import { closePaintingThreads } from '#server/pictures/painting-threads'
import { closePhotoThreads } from '#server/photos/photo-pool'
import { seedDemo } from '#server/seed/seed-demo'
import { settings } from '#server/settings'

const signIns = await seedDemo(database(), step => console.log(`  ${step}`))
writeFileSync(join(settings().dataDir, 'demo-sign-ins.json'), `${JSON.stringify(signIns, null, 2)}\n`, { mode: 0o600 })
await Promise.all([closeDatabase(), closePaintingThreads(), closePhotoThreads()])
