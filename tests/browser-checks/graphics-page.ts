import { FILES } from 'graphics-files'
import { runInPage } from './run-in-page'
import { sendReport } from './send-report'

/** Runs the tests of the engine on the graphics processor, on canvases of this page. */
await sendReport(() => runInPage(FILES))
