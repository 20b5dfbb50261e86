import { type NoticeLine, type NoticePorts, openNotices } from '#server/db/notices'
import { NoticeHub } from '#server/services/live/notice-hub'
import { settings } from '#server/settings'
import { readRunNews, RUN_CHANNEL } from './run-news'

/** Tells those who follow a run that something arrived in it, whichever process took it in. */
export class RunHub extends NoticeHub {
  constructor(open: (ports: NoticePorts) => NoticeLine) {
    super(open, { topicOf: payload => readRunNews(payload)?.runId ?? null, tooMany: 'run/too-many-listening' })
  }
}

let current: RunHub | undefined

/** The hub of this process. */
export function runHub(): RunHub {
  current ??= new RunHub(ports => openNotices(settings().databaseUrl, RUN_CHANNEL, ports))
  return current
}
