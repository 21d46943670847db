import { type RefObject, useEffect } from 'react'
import { isTyping, useSingleKeys } from '@/app/_ui/single-keys'

interface Actions {
  readonly list: RefObject<HTMLUListElement | null>
  readonly search: RefObject<HTMLInputElement | null>
  /** Absent when this person may not make workbooks. */
  readonly onNew?: (() => void) | undefined
  readonly onPalette: () => void
}

/** Ctrl or Cmd+K opens the palette. Arrows, Home and End move along the rows; `/` goes to the search field, `n` makes a workbook. */
export function useListKeys({ list, search, onNew, onPalette }: Actions): void {
  const singleKeys = useSingleKeys()
  useEffect(() => {
    function onKeyDown(event: KeyboardEvent): void {
      if ((event.ctrlKey || event.metaKey) && !event.altKey && event.key.toLowerCase() === 'k') {
        event.preventDefault()
        if (!inDialog(event.target)) onPalette()
        return
      }
      if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey) return
      if (inDialog(event.target)) return
      if (isTyping(event.target) && event.target !== search.current) return
      const moved = moveAlong(list.current, event.key, event.target, search.current)
      if (moved || (singleKeys && !isTyping(event.target) && act(event.key))) event.preventDefault()
    }
    function act(key: string): boolean {
      if (key === '/') search.current?.focus()
      else if (key === 'n' && onNew) onNew()
      else return false
      return true
    }
    document.addEventListener('keydown', onKeyDown)
    return () => document.removeEventListener('keydown', onKeyDown)
  }, [list, search, onNew, onPalette, singleKeys])
}

function inDialog(target: EventTarget | null): boolean {
  return target instanceof Element && target.closest('[role="menu"], [role="dialog"]') !== null
}

/** Up from the first row goes back to the search field; down from the field goes to the first row. */
function moveAlong(
  list: HTMLUListElement | null,
  key: string,
  from: EventTarget | null,
  search: HTMLInputElement | null,
): boolean {
  const rows = [...(list?.querySelectorAll<HTMLAnchorElement>('a[data-row]') ?? [])]
  const inRow = from instanceof Element ? from.closest('li') : null
  const at = rows.findIndex((row) => inRow?.contains(row))
  const typing = from === search
  const target =
    key === 'ArrowDown'
      ? rows[Math.min(at + 1, rows.length - 1)]
      : key === 'ArrowUp' && at >= 0
        ? (rows[at - 1] ?? search)
        : key === 'Home' && !typing
          ? rows[0]
          : key === 'End' && !typing
            ? rows.at(-1)
            : undefined
  target?.focus()
  return target !== undefined && target !== null
}
