// `npm run dev`: the same services as `npm start`, and a server that follows every change.
import { launch } from './lib/launch.mjs'
import { untilStopped } from './lib/until-stopped.mjs'

await untilStopped(launch({ isDevelopment: true }))
