import { chai, GLOBAL_EXPECT, JestAsymmetricMatchers, JestChaiExpect, JestExtend, setState, type ExpectStatic } from '@vitest/expect'

/*
 * Stands in for 'vitest' where tests run in a page: the same runner and the same assertions, without the process round them.
 */
export { afterAll, afterEach, beforeAll, beforeEach, describe, it, test } from '@vitest/runner'

for (const plugin of [JestExtend, JestChaiExpect, JestAsymmetricMatchers]) chai.use(plugin)

// Chai's own function, told to be the one the matchers look their state up by.
const asserting = (value: unknown, message?: string) => chai.expect(value, message)
export const expect = Object.assign(asserting, chai.expect) as unknown as ExpectStatic
Reflect.set(globalThis, GLOBAL_EXPECT, expect)
setState({ assertionCalls: 0, isExpectingAssertions: false, expectedAssertionsNumber: null }, expect)
