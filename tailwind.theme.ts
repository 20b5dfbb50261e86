import type { Config } from 'tailwindcss'

/**
 * theme.extend for Tailwind v3: names only, every value lives in tokens.css.
 *
 * Use the `here-*` colours inside components: a surface (class `back`, `flank` or `belly`, see tokens.css)
 * says what "here" is, so one button works on all three. Name a surface's own colours only where that surface is laid.
 * No colour takes an opacity modifier: a tint of grey over a judged colour is a lie about that colour.
 */
export const extend: Config['theme'] = {
  colors: {
    here: {
      'DEFAULT': 'var(--here)', 'ink': 'var(--here-ink)', 'quiet': 'var(--here-ink-2)', 'line': 'var(--here-line)',
      'fill': 'var(--here-fill)', 'hover': 'var(--here-hover)', 'on': 'var(--here-on)', 'on-ink': 'var(--here-on-ink)', 'next': 'var(--here-next)', 'hair': 'var(--here-hair)',
    },
    back: { DEFAULT: 'var(--back)', raised: 'var(--back-raised)', ink: 'var(--back-ink)', quiet: 'var(--back-ink-2)', line: 'var(--back-line)' },
    flank: { DEFAULT: 'var(--flank)', lit: 'var(--flank-lit)', ink: 'var(--flank-ink)', quiet: 'var(--flank-ink-2)', line: 'var(--flank-line)' },
    surround: 'var(--surround)',
    belly: { DEFAULT: 'var(--belly)', 2: 'var(--belly-2)', ink: 'var(--belly-ink)', quiet: 'var(--belly-ink-2)', line: 'var(--belly-line)', hair: 'var(--belly-hair)' },
    well: 'var(--well)',
    chosen: { DEFAULT: 'var(--chosen)', ink: 'var(--chosen-ink)' },
    next: { DEFAULT: 'var(--next)', press: 'var(--next-press)', ink: 'var(--next-ink)', edge: 'var(--next-edge)' },
    caution: { DEFAULT: 'var(--caution)', ink: 'var(--caution-ink)', quiet: 'var(--caution-ink-2)', frame: 'var(--ghs)', paper: 'var(--ghs-paper)', symbol: 'var(--ghs-ink)' },
    scrim: 'var(--scrim)',
  },
  fontFamily: { head: 'var(--font-head)', text: 'var(--font-text)', fig: 'var(--font-fig)' },
  fontSize: {
    small: ['var(--t-small)', '1.35'], label: ['var(--t-label)', '1.35'], text: ['var(--t-text)', '1.4'], lead: ['var(--t-lead)', '1.4'], fig: ['var(--t-fig)', '1.2'],
    h3: ['var(--t-h3)', '1.15'], h2: ['var(--t-h2)', '1.05'],
    h1: ['var(--t-h1)', { lineHeight: '1.05', letterSpacing: '-0.018em' }],
    plate: ['var(--t-plate)', { lineHeight: '0.92', letterSpacing: '-0.022em' }],
  },
  spacing: {
    s1: 'var(--s1)', s2: 'var(--s2)', s3: 'var(--s3)', s4: 'var(--s4)', s5: 'var(--s5)', s6: 'var(--s6)', s7: 'var(--s7)', s8: 'var(--s8)',
    fine: 'var(--target-fine)', target: 'var(--target)', bench: '56px', go: '72px', margin: 'var(--margin)',
  },
  minHeight: { fine: 'var(--target-fine)', target: 'var(--target)', bench: '56px', go: '72px' },
  minWidth: { fine: 'var(--target-fine)', target: 'var(--target)', bench: '56px' },
  borderWidth: { DEFAULT: 'var(--line)', hair: '1px', wrong: '2.5px' },
  borderColor: { DEFAULT: 'var(--here-line)' },
  borderRadius: { cut: 'var(--r-cut)', tool: 'var(--r-tool)', sheet: 'var(--r-sheet)', nose: 'var(--r-nose)' },
  boxShadow: { lift: 'var(--lift)', ring: '0 0 0 2px var(--ring-in)' },
  outlineColor: { ring: 'var(--ring-out)' },
  transitionDuration: { quick: 'var(--quick)', settle: 'var(--settle)' },
  transitionTimingFunction: { settle: 'var(--ease)' },
  // The narrower comes later, so that it wins.
  screens: { tablet: { max: '1100px' }, hand: { max: '560px' }, desk: '1101px', finger: { raw: '(pointer: coarse)' } },
}
