import { FILES } from 'law-files'
import { runInPage } from './run-in-page'
import { sendReport } from './send-report'

/** Runs the published checks and laws of the optics in this page. */
await sendReport(() => runInPage(FILES))
