/** Longest stem of a file's name. */
const STEM_MAX = 60

/** A name for a file that every file system and every header takes: "Perch in bars" → "perch-in-bars.scheme.json". */
export function fileName(name: string, ending: string): string {
  const stem = name.normalize('NFKD').replace(/\p{M}/gu, '').toLowerCase().replace(/[^a-z0-9]+/g, '-').replace(/^-+|-+$/g, '').slice(0, STEM_MAX)
  return `${stem || 'scheme'}.${ending}`
}
