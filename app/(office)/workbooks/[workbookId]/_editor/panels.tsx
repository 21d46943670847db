'use client'

import dynamic from 'next/dynamic'
import type { SolveEffect, TryEveryEffect } from '@/lib/commands'
import type { CellAddress, Operation } from '@/lib/workbook'
import type { Session } from './session'

/** A panel over the workbook, with what it was opened for. */
export type PanelShown = { readonly kind: 'look-at' } | SolveEffect | TryEveryEffect

// Their code comes when one is asked for.
const ThingsToLookAt = dynamic(() => import('./things-to-look-at').then((module) => module.ThingsToLookAt), {
  ssr: false,
})
const TryEvery = dynamic(() => import('../_trials/try-every').then((module) => module.TryEvery), {
  ssr: false,
})
const Solve = dynamic(() => import('../_trials/solve').then((module) => module.Solve), { ssr: false })

interface Props {
  readonly panel: PanelShown
  readonly session: Session
  readonly onGo: (address: CellAddress) => void
  readonly onClose: () => void
  readonly onClosed: () => void
}

export function Panels({ panel, session, onGo, onClose, onClosed }: Props) {
  /** One step of undo; the panel goes once it is done. */
  const set = (label: string, operations: readonly Operation[]): string | undefined => {
    const done = session.dispatch(label, operations)
    if (!done.ok) return done.failure.text
    onClose()
    return undefined
  }
  const shared = { session, onClose, onClosed }
  if (panel.kind === 'solve') return <Solve {...shared} asked={panel} onSet={set} />
  if (panel.kind === 'try-every') {
    return <TryEvery {...shared} asked={panel} onChoose={({ label, operations }) => set(label, operations)} />
  }
  return (
    <ThingsToLookAt
      {...shared}
      onGo={(address) => {
        onClose()
        onGo(address)
      }}
    />
  )
}
