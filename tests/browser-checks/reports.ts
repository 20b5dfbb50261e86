/** How tests went in a browser. */
export interface TestReport {
  /** Paths from the root. */
  files: string[]
  passed: number
  failures: string[]
}
