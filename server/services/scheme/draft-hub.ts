import { type NoticeLine, type NoticePorts, openNotices } from '#server/db/notices'
import { NoticeHub } from '#server/services/live/notice-hub'
import { settings } from '#server/settings'
import { DRAFT_CHANNEL, readDraftNews } from './draft-news'

/** Tells those who have a draft open what others do with it, on whichever process. */
export class DraftHub extends NoticeHub {
  constructor(open: (ports: NoticePorts) => NoticeLine) {
    super(open, { topicOf: payload => readDraftNews(payload)?.schemeId ?? null, tooMany: 'scheme/too-many-listening' })
  }
}

let current: DraftHub | undefined

/** The hub of this process. */
export function draftHub(): DraftHub {
  current ??= new DraftHub(ports => openNotices(settings().databaseUrl, DRAFT_CHANNEL, ports))
  return current
}
