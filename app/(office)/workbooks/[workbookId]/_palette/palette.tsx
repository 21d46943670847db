'use client'

import dynamic from 'next/dynamic'
import { useEffect } from 'react'
import type { PaletteProps } from './palette-props'

const load = () => import('./palette-dialog').then((module) => module.PaletteDialog)
const PaletteDialog = dynamic(load, { ssr: false })

/** Everything in one list. Its code arrives after the first paint, before it is first asked for. */
export function Palette(props: PaletteProps) {
  useEffect(() => {
    const timer = setTimeout(() => void load(), 1500)
    return () => clearTimeout(timer)
  }, [])
  return props.open ? <PaletteDialog {...props} /> : null
}
