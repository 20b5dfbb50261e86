import { type File, startTests, type Task, type VitestRunner } from '@vitest/runner'
import type { TestReport } from './reports'

/** Test files by path, each loaded when its turn comes. */
export type TestFiles = Readonly<Record<string, () => Promise<unknown>>>

/** Runs test files in this page, one after the other. */
export async function runInPage(files: TestFiles): Promise<TestReport> {
  const runner: VitestRunner = {
    config: {
      root: '/', setupFiles: [], name: 'page', passWithNoTests: false, testNamePattern: undefined, allowOnly: false, includeTaskLocation: false,
      sequence: { seed: 1, hooks: 'stack', setupFiles: 'list' },
      chaiConfig: undefined, maxConcurrency: 1, testTimeout: 120_000, hookTimeout: 120_000, retry: 0,
      tags: [], tagsFilter: undefined, strictTags: false, mergeReportsLabel: undefined,
    } as unknown as VitestRunner['config'], // the fields that its runner reads
    async importFile(path, source) {
      if (source === 'collect') await files[path]!()
    },
  }
  return reportOf(await startTests(Object.keys(files), runner))
}

function testsOf(task: Task): Task[] {
  return task.type === 'suite' ? task.tasks.flatMap(testsOf) : [task]
}

function nameOf(task: Task): string {
  return task.suite && task.suite.name !== '' ? `${nameOf(task.suite)} › ${task.name}` : task.name
}

function reportOf(files: File[]): TestReport {
  const tests = files.flatMap(file => file.tasks.flatMap(testsOf))
  return {
    files: files.map(file => file.filepath),
    passed: tests.filter(({ result }) => result?.state === 'pass').length,
    failures: [
      ...files.flatMap(file => file.result?.errors?.map(({ message }) => `${file.filepath}: ${message}`) ?? []),
      ...tests.filter(({ result }) => result?.state !== 'pass')
        .map(test => `${test.file.filepath}: ${nameOf(test)}: ${test.result?.errors?.[0]?.message ?? 'did not run'}`),
    ],
  }
}
