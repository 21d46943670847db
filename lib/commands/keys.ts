import type { Command } from './command'
import { commands } from './registry'

/**
 * Chords are written with `Mod` (Ctrl, or Cmd on a Mac), `Alt`, `Shift` in that order, then the key: `Mod+Shift+Z`.
 * [K1] No two commands share a chord. [K2] Outside the grid no chord takes a key of the browser's own, but for
 * `Mod+K`, by which the palette is opened everywhere.
 */
export type Platform = 'mac' | 'other'

/** The parts of a keyboard event that decide; a DOM event fits. */
export interface KeyPress {
  readonly key: string
  /** The key's place on the board ("KeyZ"); tells letters apart where Alt makes another sign of them. */
  readonly code?: string
  readonly ctrlKey: boolean
  readonly metaKey: boolean
  readonly altKey: boolean
  readonly shiftKey: boolean
  readonly isComposing?: boolean
}

export function platformOf(userAgent: string): Platform {
  return /Mac|iPhone|iPad/i.test(userAgent) ? 'mac' : 'other'
}

/** `undefined` while text is being composed, for a modifier alone, and where the other platform's modifier is held. */
export function chordOf(press: KeyPress, platform: Platform): string | undefined {
  const { key } = press
  if (press.isComposing || key === 'Process' || key === 'Dead') return undefined
  if (['Control', 'Meta', 'Alt', 'Shift', 'AltGraph'].includes(key)) return undefined
  const mod = platform === 'mac' ? press.metaKey : press.ctrlKey
  const stranger = platform === 'mac' ? press.ctrlKey : press.metaKey
  if (stranger) return undefined
  const parts = [mod && 'Mod', press.altKey && 'Alt', press.shiftKey && 'Shift', plainKey(press)]
  return parts.filter(Boolean).join('+')
}

function plainKey({ key, code, altKey }: KeyPress): string {
  // Alt+Shift+S is "Í" or another sign on a Mac: the place of the key says which letter is meant.
  const letter = altKey ? /^Key([A-Z])$/.exec(code ?? '')?.[1] : undefined
  if (letter) return letter
  if (key === ' ') return 'Space'
  return key.length === 1 ? key.toUpperCase() : key
}

const inGrid = new Map<string, Command>()
const everywhere = new Map<string, Command>()
for (const command of commands) {
  for (const chord of command.keys ?? []) {
    inGrid.set(chord, command)
    if (command.keysWork === 'everywhere') everywhere.set(chord, command)
  }
}

/** The command that the keys stand for, where the keyboard is; whether it may run is asked of `when`. */
export function resolveKey(
  press: KeyPress,
  platform: Platform,
  place: 'grid' | 'page' = 'grid',
): Command | undefined {
  const chord = chordOf(press, platform)
  if (chord === undefined) return undefined
  return (place === 'grid' ? inGrid : everywhere).get(chord)
}

const names: Readonly<Record<string, readonly [mac: string, other: string]>> = {
  Mod: ['⌘', 'Ctrl'],
  Alt: ['⌥', 'Alt'],
  Shift: ['⇧', 'Shift'],
  Enter: ['↩', 'Enter'],
  Backspace: ['⌫', 'Backspace'],
  Delete: ['⌦', 'Del'],
  ArrowUp: ['↑', '↑'],
  ArrowDown: ['↓', '↓'],
  ArrowLeft: ['←', '←'],
  ArrowRight: ['→', '→'],
  PageUp: ['Page ↑', 'PgUp'],
  PageDown: ['Page ↓', 'PgDn'],
}

/** `Ctrl Shift Z`, or `⌥ ⇧ ⌘ Z` in the order that Macs write them: one entry a key cap. */
export function keyCaps(chord: string, platform: Platform): readonly string[] {
  const keys = chord.split('+')
  if (platform === 'other') return keys.map((key) => names[key]?.[1] ?? key)
  const order = ['Alt', 'Shift', 'Mod']
  const place = (key: string) => (order.includes(key) ? order.indexOf(key) : order.length)
  return [...keys].sort((a, b) => place(a) - place(b)).map((key) => names[key]?.[0] ?? key)
}

/** One text for labels and titles: `Ctrl+Shift+Z`, `⇧⌘Z`. */
export function keyLabel(chord: string, platform: Platform): string {
  return keyCaps(chord, platform).join(platform === 'mac' ? '' : '+')
}

/** For `aria-keyshortcuts`: `Control+Shift+Z`, `Meta+Shift+Z`. */
export function ariaKeys(chord: string, platform: Platform): string {
  return chord.replace(/^Mod/, platform === 'mac' ? 'Meta' : 'Control')
}
