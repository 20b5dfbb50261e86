import { describe, expect, it } from 'vitest'
import { listPlace, placesNow, placesOf } from '~/composables/keys/key-list'
import { isPress, isWriting, type KeysDown, pressWords } from '~/composables/keys/key-press'
import { keyFor } from '~/composables/keys/use-keys'

const down = (key: string, more: Partial<KeysDown> = {}): KeysDown => ({ key, ctrlKey: false, metaKey: false, altKey: false, shiftKey: false, ...more })

describe('a press', () => {
  it.each([
    [down('z', { ctrlKey: true }), 'Mod+Z', true],
    [down('Z', { metaKey: true, shiftKey: true }), 'Mod+Shift+Z', true],
    [down('Z', { ctrlKey: true, shiftKey: true }), 'Mod+Z', false],
    [down('z'), 'Mod+Z', false],
    [down('z', { ctrlKey: true, altKey: true }), 'Mod+Z', false],
    [down('?', { shiftKey: true }), '?', true],
    [down('?', { ctrlKey: true }), '?', false],
    [down('ArrowUp'), 'ArrowUp', true],
    [down('ArrowUp', { shiftKey: true }), 'ArrowUp', false],
    [down(' '), ' ', true],
    [down('+'), '+', true],
  ])('%o is %s: %s', (event, press, is) => {
    expect(isPress(event, press)).toBe(is)
  })

  it('is written as it stands on the keyboard', () => {
    expect(pressWords('Mod+Shift+Z')).toEqual(['Ctrl or ⌘', 'Shift', 'Z'])
    expect([' ', 'ArrowUp', '?', '+'].map(press => pressWords(press))).toEqual([['Space'], ['Up'], ['?'], ['+']])
  })
})

describe('where somebody writes', () => {
  it.each([
    [{ tagName: 'TEXTAREA' }, true, true], [{ tagName: 'INPUT', type: 'text' }, true, true], [{ tagName: 'INPUT', type: 'number' }, true, true],
    [{ tagName: 'DIV', isContentEditable: true }, true, true], [{ tagName: 'SELECT' }, true, false],
    [{ tagName: 'INPUT', type: 'range' }, false, false], [{ tagName: 'INPUT', type: 'checkbox' }, false, false], [{ tagName: 'BUTTON' }, false, false], [null, false, false],
  ])('%o takes bare keys: %s, and those with Ctrl: %s', (target, bare, mod) => {
    expect([isWriting(target), isWriting(target, false)]).toEqual([bare, mod])
  })
})

describe('the list of keys', () => {
  it('shows what is on the screen now, and each place once', () => {
    const place = { place: 'Film section', on: 'a handle', keys: [{ press: [' '], words: 'Pick up' }] }
    const [off, offAgain] = [listPlace(place), listPlace({ ...place, on: undefined }), listPlace(place)]
    expect(placesNow().map(each => each.on)).toEqual([undefined, 'a handle'])
    off()
    offAgain()
    expect(placesNow()).toHaveLength(1)
  })

  it('puts what works everywhere before what needs the focus', () => {
    const at = (place: string, on?: string) => ({ place, on, keys: [] })
    expect(placesOf([at('Water', 'the plumb'), at('Scheme'), at('Water', 'the plumb')]).map(each => each.place)).toEqual(['Scheme', 'Water'])
  })

  it('does what it shows: the key that answers is an entry of the same table', () => {
    const keys = [{ press: ['Home'], words: 'To the start', run: () => undefined }, { press: ['End', 'PageDown'], words: 'To the end', run: () => undefined }]
    const event = (key: string) => down(key) as KeyboardEvent
    for (const key of keys) for (const press of key.press) expect(keyFor(keys, event(press))).toBe(key)
    expect(keyFor(keys, event('x'))).toBeUndefined()
  })
})
