import { describe, expect, it } from 'vitest'
import {
  ariaKeys,
  chordOf,
  commands,
  type KeyPress,
  keyCaps,
  keyLabel,
  platformOf,
  resolveKey,
} from '@/lib/commands'

function press(key: string, held: Partial<KeyPress> = {}): KeyPress {
  return { key, ctrlKey: false, metaKey: false, altKey: false, shiftKey: false, ...held }
}

/** Keys of Chromium, Firefox and WebKit themselves, on any platform; from memory of their menus. */
const browserOwn = new Set(
  [
    'A B C D E F G H I J K L M N O P Q R S T U V W X Y Z 0 1 2 3 4 5 6 7 8 9 + - = Enter Tab PageUp PageDown F4'
      .split(' ')
      .map((key) => `Mod+${key}`),
    'A B C D E I J K L M N O P R S T V W X Y Z Delete Tab'.split(' ').map((key) => `Mod+Shift+${key}`),
    [
      'Alt+ArrowLeft',
      'Alt+ArrowRight',
      'Alt+Home',
      'Alt+D',
      'Alt+F4',
      'F1',
      'F3',
      'F5',
      'F6',
      'F7',
      'F11',
      'F12',
    ],
    [
      'Shift+F10',
      'Tab',
      'Shift+Tab',
      'Escape',
      'Space',
      'Enter',
      'Delete',
      'Backspace',
      'ArrowUp',
      'ArrowDown',
    ],
  ].flat(),
)

describe('chords', () => {
  const all = commands.flatMap(({ id, keys, keysWork }) =>
    (keys ?? []).map((chord) => ({ id, chord, keysWork })),
  )

  it('[K1] no two commands share one', () => {
    const owners = new Map<string, string[]>()
    for (const { id, chord } of all) owners.set(chord, [...(owners.get(chord) ?? []), id])
    expect([...owners].filter(([, ids]) => ids.length > 1)).toEqual([])
  })

  it('[K2] none takes a key of the browser outside the grid, but for the palette', () => {
    const taken = all.filter(({ chord, keysWork }) => keysWork === 'everywhere' && browserOwn.has(chord))
    expect(taken.map(({ id, chord }) => `${id} ${chord}`)).toEqual(['open-palette Mod+K'])
    for (const { chord } of all.filter(({ keysWork }) => keysWork !== 'everywhere')) {
      const [key = '', ...held] = chord.split('+').reverse()
      const event = press(key, {
        ctrlKey: held.includes('Mod'),
        altKey: held.includes('Alt'),
        shiftKey: held.includes('Shift'),
      })
      expect(resolveKey(event, 'other', 'page'), chord).toBeUndefined()
      expect(resolveKey(event, 'other', 'grid'), chord).toBeDefined()
    }
  })

  it('are written in one order of modifiers', () => {
    for (const { chord } of all) expect(chord).toMatch(/^(Mod\+)?(Alt\+)?(Shift\+)?[^+]+$/)
  })

  it('closing, reloading and leaving the page stay with the browser everywhere', () => {
    const never = [
      'Mod+W',
      'Mod+T',
      'Mod+N',
      'Mod+R',
      'Mod+L',
      'Mod+Q',
      'F5',
      'F6',
      'F11',
      'F12',
      'Tab',
      'Alt+F4',
    ]
    expect(all.filter(({ chord }) => never.includes(chord))).toEqual([])
  })
})

describe('resolveKey', () => {
  it.each([
    ['Ctrl+K', press('k', { ctrlKey: true }), 'other', 'open-palette'],
    ['Cmd+K', press('k', { metaKey: true }), 'mac', 'open-palette'],
    ['Ctrl+K is no palette on a Mac', press('k', { ctrlKey: true }), 'mac', undefined],
    ['the Windows key is left alone', press('k', { metaKey: true }), 'other', undefined],
    ['Ctrl+Z', press('z', { ctrlKey: true }), 'other', 'undo'],
    ['Ctrl+Shift+Z', press('Z', { ctrlKey: true, shiftKey: true }), 'other', 'redo'],
    ['Ctrl+Y', press('y', { ctrlKey: true }), 'other', 'redo'],
    ['F2', press('F2'), 'other', 'edit-cell'],
    ['Shift+F2', press('F2', { shiftKey: true }), 'other', 'edit-note'],
    ['Delete', press('Delete'), 'other', 'clear-cells'],
    ['Cmd+Backspace', press('Backspace', { metaKey: true }), 'mac', 'remove-rows'],
    ['Alt+Down', press('ArrowDown', { altKey: true }), 'other', 'move-rows-down'],
    ['Option+Shift+C types Ç', press('Ç', { code: 'KeyC', altKey: true, shiftKey: true }), 'mac', 'cover'],
    ['a plain letter', press('z'), 'other', undefined],
    ['a modifier alone', press('Control', { ctrlKey: true }), 'other', undefined],
    ['while composing', press('z', { ctrlKey: true, isComposing: true }), 'other', undefined],
  ] as const)('%s', (_, event, platform, id) => {
    expect(resolveKey(event, platform)?.id).toBe(id)
  })

  it('names the keys as the platform does', () => {
    expect(keyLabel('Mod+Shift+Z', 'other')).toBe('Ctrl+Shift+Z')
    expect(keyLabel('Mod+Shift+Z', 'mac')).toBe('⇧⌘Z')
    expect(keyCaps('Mod+Alt+Enter', 'other')).toEqual(['Ctrl', 'Alt', 'Enter'])
    expect(ariaKeys('Mod+K', 'mac')).toBe('Meta+K')
    expect(chordOf(press(' ', { ctrlKey: true }), 'other')).toBe('Mod+Space')
    expect(platformOf('Mozilla/5.0 (Macintosh; Intel Mac OS X 10_15_7)')).toBe('mac')
    expect(platformOf('Mozilla/5.0 (X11; Linux x86_64)')).toBe('other')
  })
})
