declare module '#app' {
  interface PageMeta {
    /** Shown to anybody; who they are is not asked. */
    public?: boolean
  }
}

export {}
