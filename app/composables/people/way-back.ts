/** Where to go after signing in: the page that was wanted, and only a page of ours. */
export function wayBack(back: unknown): string {
  if (typeof back !== 'string' || !/^\/(?![/\\])/.test(back)) return '/'
  return back
}
