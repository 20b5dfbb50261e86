/** Lets other requests through between two pieces of a long work-out, such as one paint's colour and the next's. */
export function othersFirst(): Promise<void> {
  return new Promise((done) => {
    setImmediate(done)
  })
}
