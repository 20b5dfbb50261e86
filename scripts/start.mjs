// `npm start`: from a bare machine with Node to the running application with a demo workshop. Until the libraries are
// installed nothing here may import one.
import { launch } from './lib/launch.mjs'
import { untilStopped } from './lib/until-stopped.mjs'

await untilStopped(launch({ isDevelopment: false }))
