import { useSyncExternalStore } from 'react'

/**
 * Shortcuts made of one plain character can get in the way of speech input, so a person can switch them off
 * (WCAG 2.2, 2.1.4). Kept in this browser.
 */
const storageKey = 'panewright-single-keys'
const listeners = new Set<() => void>()

function areOn(): boolean {
  try {
    return localStorage.getItem(storageKey) !== 'off'
  } catch {
    return true
  }
}

export function setSingleKeys(on: boolean): void {
  try {
    localStorage.setItem(storageKey, on ? 'on' : 'off')
  } catch {
    // Storage may be forbidden; the choice then lasts as long as the page.
  }
  for (const listener of listeners) listener()
}

export function useSingleKeys(): boolean {
  return useSyncExternalStore(subscribe, areOn, () => true)
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener)
  return () => listeners.delete(listener)
}

/** Whether a key press is text on its way into a field, and so no shortcut. */
export function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof HTMLElement &&
    (target.isContentEditable ||
      target.matches('input, textarea, select, [role="textbox"], [role="combobox"]'))
  )
}
