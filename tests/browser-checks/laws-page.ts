import { type File, startTests, type Task, type VitestRunner } from '@vitest/runner'
import { FILES } from 'test-files'
import { sendReport } from './send-report'
import type { LawsReport } from './reports'

/** Runs the published checks and laws in this page and tells the server how they went. */

// Draws of laws are the same as in Node: every test file sets its own seed.
const runner: VitestRunner = {
  config: {
    root: '/', setupFiles: [], name: 'page', passWithNoTests: false, testNamePattern: undefined, allowOnly: false, includeTaskLocation: false,
    sequence: { seed: 1, hooks: 'stack', setupFiles: 'list' },
    chaiConfig: undefined, maxConcurrency: 1, testTimeout: 60_000, hookTimeout: 60_000, retry: 0,
    tags: [], tagsFilter: undefined, strictTags: false, mergeReportsLabel: undefined,
  } as unknown as VitestRunner['config'], // the fields that runner 4.1 reads
  async importFile(path, source) {
    if (source === 'collect') await FILES[path]!()
  },
}

function testsOf(task: Task): Task[] {
  return task.type === 'suite' ? task.tasks.flatMap(testsOf) : [task]
}

function nameOf(task: Task): string {
  return task.suite && task.suite.name !== '' ? `${nameOf(task.suite)} › ${task.name}` : task.name
}

function reportOf(files: File[]): LawsReport {
  const tests = files.flatMap(file => file.tasks.flatMap(testsOf))
  return {
    files: files.map(file => ({ path: file.filepath, tests: file.tasks.flatMap(testsOf).length, failure: file.result?.errors?.[0]?.message ?? null })),
    passed: tests.filter(({ result }) => result?.state === 'pass').length,
    failures: tests.filter(({ result }) => result?.state !== 'pass')
      .map(test => `${test.file.filepath}: ${nameOf(test)}: ${test.result?.errors?.[0]?.message ?? 'did not run'}`),
  }
}

await sendReport(async () => reportOf(await startTests(Object.keys(FILES), runner)))
