import type { Config } from 'tailwindcss'
import { extend } from './tailwind.theme'

export default { content: ['./app/**/*.{vue,ts}'], theme: { extend } } satisfies Config
