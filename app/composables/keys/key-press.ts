/** The part of a key event that says which keys are down. */
export type KeysDown = Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'altKey' | 'shiftKey'>

/** What a key is called on the keyboard and in speech, where that is not its own letter. */
const NAMES: Readonly<Record<string, string>> = {
  ' ': 'Space', 'ArrowUp': 'Up', 'ArrowDown': 'Down', 'ArrowLeft': 'Left', 'ArrowRight': 'Right', 'PageUp': 'Page up', 'PageDown': 'Page down', 'Mod': 'Ctrl or ⌘',
}

/**
 * Whether these keys are the press that is written as "Mod+Shift+Z", "ArrowUp" or "?": Mod is Ctrl, or ⌘ where there is one.
 * Signs that need Shift on some keyboards are told by the sign alone.
 */
export function isPress(event: KeysDown, press: string): boolean {
  const parts = press.length > 1 ? press.split('+') : [press]
  const key = parts.at(-1) ?? ''
  const isLetter = /^[a-z]$/i.test(key)
  const isSign = key.length === 1 && !isLetter && key !== ' '
  return (isLetter ? event.key.toLowerCase() === key.toLowerCase() : event.key === key)
    && (event.ctrlKey || event.metaKey) === parts.includes('Mod')
    && !event.altKey
    && (isSign || event.shiftKey === parts.includes('Shift'))
}

/** The keys of a press, one after another, as they are written on the keyboard. */
export function pressWords(press: string): string[] {
  const parts = press.length > 1 ? press.split('+') : [press]
  return parts.map(part => NAMES[part] ?? part)
}

const NO_LETTERS = new Set(['radio', 'checkbox', 'range', 'button', 'submit', 'reset', 'color', 'file', 'image'])

/**
 * Whether somebody writes here, so that every key is a letter and no key is a command.
 * @param isBare a key without Ctrl or ⌘: a list goes by its letters
 */
export function isWriting(target: { tagName?: string, type?: string, isContentEditable?: boolean } | EventTarget | null, isBare = true): boolean {
  if (target === null || !('tagName' in target)) return false
  if ('isContentEditable' in target && target.isContentEditable === true) return true
  switch (target.tagName) {
    case 'TEXTAREA': return true
    case 'SELECT': return isBare
    case 'INPUT': return !('type' in target && typeof target.type === 'string' && NO_LETTERS.has(target.type))
    default: return false
  }
}
