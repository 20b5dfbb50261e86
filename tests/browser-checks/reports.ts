/** How the published checks and laws went in a browser. */
export interface LawsReport {
  files: { path: string, tests: number, failure: string | null }[]
  passed: number
  failures: string[]
}
