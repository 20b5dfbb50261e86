import { existsSync, readFileSync, readdirSync } from 'node:fs'
import { expect, it } from 'vitest'

const pages = ['README.md', 'DEVELOPERS.md', ...readdirSync('docs', { recursive: true, encoding: 'utf8' }).filter(file => file.endsWith('.md')).map(file => `docs/${file}`)]

/** Paths of the repository named in code marks: a known top folder and no placeholder. */
function pathsIn(page: string): string[] {
  const named = readFileSync(page, 'utf8').matchAll(/`((?:app|server|shared|scripts|tests|docs|drizzle|public|docker-less-s3-fake)\/[^\s`]*)`/g)
  return [...named].map(match => match[1]!).filter(path => !path.includes('<'))
}

it.each(pages)('%s names only files and folders that are there', (page) => {
  expect(pathsIn(page).filter(path => !existsSync(path.replace(/\*.*$/, '')))).toEqual([])
})
