'use client'

import dynamic from 'next/dynamic'
import type { CellAddress } from '@/lib/workbook'
import type { Session } from './session'

/** A panel over the workbook, with what it was opened for. */
export type PanelShown = { readonly kind: 'look-at' }

const ThingsToLookAt = dynamic(() => import('./things-to-look-at').then((module) => module.ThingsToLookAt), {
  ssr: false,
})

interface Props {
  readonly panel: PanelShown
  readonly session: Session
  readonly onGo: (address: CellAddress) => void
  readonly onClose: () => void
  readonly onClosed: () => void
}

/** The panel that is open; their code comes when one is asked for. */
export function Panels({ session, onGo, onClose, onClosed }: Props) {
  return (
    <ThingsToLookAt
      session={session}
      onGo={(address) => {
        onClose()
        onGo(address)
      }}
      onClose={onClose}
      onClosed={onClosed}
    />
  )
}
