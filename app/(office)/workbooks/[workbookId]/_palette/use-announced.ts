import { useEffect, useState } from 'react'
import type { PaletteState } from './use-palette'

/** What a screen reader says once typing pauses: how many there are, or what is wrong. */
export function useAnnounced(palette: PaletteState): string {
  const [announced, setAnnounced] = useState('')
  const { stage, entries, options, message } = palette
  const count = options ? options.length : entries.length
  const counted = stage.kind === 'fill' && !options ? '' : count === 1 ? '1 result' : `${count} results`
  const words = message ?? (count === 0 && counted !== '' ? 'No results' : counted)
  useEffect(() => {
    const timer = setTimeout(() => setAnnounced(words), message === undefined ? 350 : 0)
    return () => clearTimeout(timer)
  }, [words, message])
  return announced
}
