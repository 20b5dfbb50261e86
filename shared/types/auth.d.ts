declare module '#auth-utils' {
  interface SecureSessionData {
    /** The row that decides; the only thing in the cookie. */
    sessionId: string
  }
}

export {}
