import { type RefObject, useEffect, useRef } from 'react'
import { isTyping } from '@/app/_ui/single-keys'
import { type Command, type Platform, resolveKey } from '@/lib/commands'
import { cycleRegion } from './focus'

/** Keys that work wherever the focus is: those of commands that say so, and F6 from part to part. */
export function useEditorKeys(
  root: RefObject<HTMLElement | null>,
  platform: Platform,
  paletteOpen: boolean,
  onCommand: (command: Command) => void,
): void {
  const run = useRef(onCommand)
  run.current = onCommand
  useEffect(() => {
    if (paletteOpen) return
    const onKeyDown = (event: KeyboardEvent) => {
      if (event.defaultPrevented) return
      const { ctrlKey, metaKey, altKey } = event
      if (event.key === 'F6' && !ctrlKey && !metaKey && !altKey && root.current) {
        event.preventDefault()
        cycleRegion(root.current, event.shiftKey ? -1 : 1)
        return
      }
      // Saving goes on by itself; the browser's own "save page" would only puzzle.
      if (event.key.toLowerCase() === 's' && (platform === 'mac' ? metaKey : ctrlKey)) event.preventDefault()
      const command = resolveKey(event, platform, 'page')
      if (!command || (isTyping(event.target) && !ctrlKey && !metaKey && !altKey)) return
      event.preventDefault()
      run.current(command)
    }
    window.addEventListener('keydown', onKeyDown)
    return () => window.removeEventListener('keydown', onKeyDown)
  }, [root, platform, paletteOpen])
}
