import { describe, expect, it } from 'vitest'
import { editAction, gridAction, isTyped } from '@/app/(office)/workbooks/[workbookId]/_grid/keys'

/** `Ctrl+Shift+End` as the press it is, on a keyboard with Ctrl. */
function press(chord: string) {
  const parts = chord.split('+')
  const has = (part: string) => parts.slice(0, -1).includes(part)
  return {
    key: parts.at(-1) ?? '',
    ctrlKey: has('Ctrl'),
    metaKey: has('Meta'),
    shiftKey: has('Shift'),
    altKey: has('Alt'),
  }
}

describe('keys while a cell is selected', () => {
  it.each([
    ['ArrowUp', { kind: 'move', rows: -1, columns: 0, extend: false }],
    ['ArrowDown', { kind: 'move', rows: 1, columns: 0, extend: false }],
    ['ArrowLeft', { kind: 'move', rows: 0, columns: -1, extend: false }],
    ['Shift+ArrowRight', { kind: 'move', rows: 0, columns: 1, extend: true }],
    ['Ctrl+ArrowRight', { kind: 'block', rows: 0, columns: 1, extend: false }],
    ['Ctrl+Shift+ArrowDown', { kind: 'block', rows: 1, columns: 0, extend: true }],
    ['Home', { kind: 'jump', to: 'row-start', extend: false }],
    ['End', { kind: 'jump', to: 'row-end', extend: false }],
    ['Ctrl+Home', { kind: 'jump', to: 'sheet-start', extend: false }],
    ['Ctrl+Shift+End', { kind: 'jump', to: 'sheet-end', extend: true }],
    ['PageDown', { kind: 'page', by: 1, extend: false }],
    ['Shift+PageUp', { kind: 'page', by: -1, extend: true }],
    ['Tab', { kind: 'step', axis: 'column', by: 1 }],
    ['Shift+Tab', { kind: 'step', axis: 'column', by: -1 }],
    ['Enter', { kind: 'step', axis: 'row', by: 1 }],
    ['Shift+Enter', { kind: 'step', axis: 'row', by: -1 }],
    ['Ctrl+a', { kind: 'select', what: 'all' }],
    ['Shift+ ', { kind: 'select', what: 'row' }],
    ['Ctrl+ ', { kind: 'select', what: 'column' }],
    ['Escape', { kind: 'collapse' }],
    ['7', { kind: 'type' }],
    ['=', { kind: 'type' }],
    [' ', { kind: 'type' }],
    ['Shift+A', { kind: 'type' }],
    ['é', { kind: 'type' }],
    ['Process', { kind: 'type' }],
    ['Dead', { kind: 'type' }],
    ['Ctrl+Alt+€', { kind: 'type' }],
  ])('%s', (chord, action) => expect(gridAction(press(chord), 'other')).toEqual(action))

  it.each(['Ctrl+k', 'Ctrl+t', 'F5', 'Ctrl+PageDown', 'Ctrl+Tab', 'Alt+ArrowUp', 'Shift', 'Control', 'F6'])(
    '%s is left to others',
    (chord) => expect(gridAction(press(chord), 'other')).toBeUndefined(),
  )

  it('Cmd takes the place of Ctrl on a Mac', () => {
    expect(gridAction(press('Meta+ArrowUp'), 'mac')).toMatchObject({ kind: 'block' })
    expect(gridAction(press('Meta+a'), 'mac')).toEqual({ kind: 'select', what: 'all' })
    expect(isTyped(press('Meta+a'))).toBe(false)
  })
})

describe('keys while a cell is being written', () => {
  it.each([
    ['Enter', { kind: 'commit', axis: 'row', by: 1 }],
    ['Shift+Enter', { kind: 'commit', axis: 'row', by: -1 }],
    ['Tab', { kind: 'commit', axis: 'column', by: 1 }],
    ['Shift+Tab', { kind: 'commit', axis: 'column', by: -1 }],
    ['Escape', { kind: 'cancel' }],
    ['Alt+Enter', { kind: 'newline' }],
    ['ArrowDown', { kind: 'commit', axis: 'row', by: 1 }],
    ['ArrowLeft', { kind: 'commit', axis: 'column', by: -1 }],
  ])('typing over: %s', (chord, action) => expect(editAction(press(chord), 'replace', false)).toEqual(action))

  it.each(['ArrowLeft', 'ArrowRight', 'ArrowUp', 'Home', 'a', 'Delete'])(
    'after F2 %s belongs to the text',
    (chord) => expect(editAction(press(chord), 'amend', false)).toBeUndefined(),
  )

  it('up and down choose while choices are shown', () => {
    expect(editAction(press('ArrowDown'), 'replace', true)).toEqual({ kind: 'choose', by: 1 })
    expect(editAction(press('ArrowUp'), 'amend', true)).toEqual({ kind: 'choose', by: -1 })
  })

  it('an Enter that ends a composition commits nothing', () => {
    expect(editAction({ ...press('Enter'), isComposing: true }, 'replace', false)).toBeUndefined()
  })
})
