import type { KeyPress, Platform } from '@/lib/commands'

/**
 * The one place that says what the plain keys do in the grid: moving, selecting, writing. Keys of commands
 * (Mod+Z, Delete, F2 …) are in the registry and are asked first.
 */
export type GridAction =
  | { readonly kind: 'move'; readonly rows: number; readonly columns: number; readonly extend: boolean }
  /** To the edge of the block of filled cells, as far as it goes in that direction. */
  | { readonly kind: 'block'; readonly rows: number; readonly columns: number; readonly extend: boolean }
  | { readonly kind: 'page'; readonly by: -1 | 1; readonly extend: boolean }
  | {
      readonly kind: 'jump'
      readonly to: 'row-start' | 'row-end' | 'sheet-start' | 'sheet-end'
      readonly extend: boolean
    }
  /** Enter and Tab: inside a range they go round it; a run of Tabs followed by Enter returns to its first column. */
  | { readonly kind: 'step'; readonly axis: 'row' | 'column'; readonly by: -1 | 1 }
  | { readonly kind: 'select'; readonly what: 'all' | 'row' | 'column' }
  | { readonly kind: 'type' }
  | { readonly kind: 'collapse' }

const arrows: Readonly<Record<string, readonly [rows: number, columns: number]>> = {
  ArrowUp: [-1, 0],
  ArrowDown: [1, 0],
  ArrowLeft: [0, -1],
  ArrowRight: [0, 1],
}

/** What the key does while a cell is selected and nothing is being edited; undefined leaves it to the browser. */
export function gridAction(press: KeyPress, platform: Platform): GridAction | undefined {
  const mod = platform === 'mac' ? press.metaKey : press.ctrlKey
  const extend = press.shiftKey
  const arrow = arrows[press.key]
  if (press.altKey && !(press.key.length === 1)) return undefined
  if (arrow) {
    const [rows, columns] = arrow
    return { kind: mod ? 'block' : 'move', rows, columns, extend }
  }
  switch (press.key) {
    case 'Home':
      return { kind: 'jump', to: mod ? 'sheet-start' : 'row-start', extend }
    case 'End':
      return { kind: 'jump', to: mod ? 'sheet-end' : 'row-end', extend }
    case 'PageUp':
    case 'PageDown':
      return mod ? undefined : { kind: 'page', by: press.key === 'PageUp' ? -1 : 1, extend }
    case 'Enter':
      return mod ? undefined : { kind: 'step', axis: 'row', by: press.shiftKey ? -1 : 1 }
    case 'Tab':
      return mod ? undefined : { kind: 'step', axis: 'column', by: press.shiftKey ? -1 : 1 }
    case 'Escape':
      return { kind: 'collapse' }
    case ' ':
      if (mod) return { kind: 'select', what: 'column' }
      if (press.shiftKey) return { kind: 'select', what: 'row' }
      return { kind: 'type' }
  }
  if (mod && press.key.toLowerCase() === 'a' && !press.shiftKey) return { kind: 'select', what: 'all' }
  return isTyped(press) ? { kind: 'type' } : undefined
}

/** A key that writes something: a single character without Ctrl or Cmd (AltGr sets both Ctrl and Alt), or one that starts a composition. */
export function isTyped(press: KeyPress): boolean {
  if (press.isComposing || press.key === 'Process' || press.key === 'Dead') return true
  if ([...press.key].length !== 1) return false
  const altGr = press.ctrlKey && press.altKey
  return altGr || (!press.ctrlKey && !press.metaKey)
}

export type EditAction =
  | { readonly kind: 'commit'; readonly axis: 'row' | 'column' | 'none'; readonly by: -1 | 0 | 1 }
  | { readonly kind: 'cancel' }
  | { readonly kind: 'choose'; readonly by: -1 | 1 }
  | { readonly kind: 'newline' }

/**
 * What the key does while a cell is being edited. After typing over a cell the arrows commit and move on,
 * as after Enter; once F2 or a double-click has opened the text they move the caret.
 */
export function editAction(
  press: KeyPress,
  mode: 'replace' | 'amend',
  choosing: boolean,
): EditAction | undefined {
  if (press.isComposing) return undefined
  switch (press.key) {
    case 'Enter':
      if (press.altKey) return { kind: 'newline' }
      return { kind: 'commit', axis: 'row', by: press.shiftKey ? -1 : 1 }
    case 'Tab':
      return { kind: 'commit', axis: 'column', by: press.shiftKey ? -1 : 1 }
    case 'Escape':
      return { kind: 'cancel' }
    case 'ArrowUp':
    case 'ArrowDown': {
      const by = press.key === 'ArrowUp' ? -1 : 1
      if (choosing) return { kind: 'choose', by }
      return mode === 'replace' && !press.shiftKey ? { kind: 'commit', axis: 'row', by } : undefined
    }
    case 'ArrowLeft':
    case 'ArrowRight':
      if (mode === 'amend' || press.shiftKey || press.ctrlKey || press.metaKey) return undefined
      return { kind: 'commit', axis: 'column', by: press.key === 'ArrowLeft' ? -1 : 1 }
  }
  return undefined
}
