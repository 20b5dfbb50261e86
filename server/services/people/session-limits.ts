const MINUTE = 60 * 1000
const DAY = 24 * 60 * MINUTE

/** A session ends after this long without use, in milliseconds. */
export const SESSION_LASTS = 30 * DAY

/** How exactly a session's last use is known, in milliseconds: not every request writes. */
export const SEEN_EVERY = 3 * MINUTE

/** An invitation can be accepted this long, in milliseconds. */
export const INVITATION_LASTS = 7 * DAY

/** The link that opens a workshop works this long, in milliseconds. */
export const SIGN_UP_LASTS = DAY

/** A link to a new password works this long, in milliseconds. */
export const RESET_LASTS = 60 * MINUTE
