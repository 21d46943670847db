import { useEffect, useState } from 'react'
import { onThemeChange } from '@/app/_ui/theme'
import { type Colours, fontsReady, readColours } from './palette-colours'

/** The colours for drawing, once the fonts are there; a new object whenever the theme is switched. */
export function useCanvasTheme(): Colours | undefined {
  const [colours, setColours] = useState<Colours | undefined>(undefined)
  useEffect(() => {
    let gone = false
    void fontsReady().then(() => {
      if (!gone) setColours(readColours())
    })
    const stop = onThemeChange(() => setColours((before) => before && readColours()))
    return () => {
      gone = true
      stop()
    }
  }, [])
  return colours
}
