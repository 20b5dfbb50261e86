/** What somebody signed in on, in a word, from the description a browser gives of itself; a hint, never a proof. */
export function deviceName(userAgent: string | undefined): string {
  if (!userAgent) return 'Unknown device'
  if (/\b(?:iPad|Tablet)\b/i.test(userAgent) || (/\bAndroid\b/i.test(userAgent) && !/\bMobile\b/i.test(userAgent))) return 'Tablet'
  if (/\bMobile\b|\biPhone\b/i.test(userAgent)) return 'Phone'
  return 'Computer'
}
