import { z } from 'zod'

/** zod tries whether it may compile its checks; the content policy says no and tells the console so. It need not ask. */
export default defineNuxtPlugin({
  name: 'no-eval',
  enforce: 'pre',
  setup() {
    z.config({ jitless: true })
  },
})
