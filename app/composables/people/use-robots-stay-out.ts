/** A page behind a secret link is nobody's to list. */
export function useRobotsStayOut(): void {
  useHead({ meta: [{ name: 'robots', content: 'noindex, nofollow' }] })
}
