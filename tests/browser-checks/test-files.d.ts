/** Test files that the bundler gathers; made by `bundle-page.ts`. */
declare module 'law-files' {
  export const FILES: import('./run-in-page').TestFiles
}
declare module 'graphics-files' {
  export const FILES: import('./run-in-page').TestFiles
}
