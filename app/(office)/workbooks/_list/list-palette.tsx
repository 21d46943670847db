'use client'

import { useRouter } from 'next/navigation'
import { useMemo } from 'react'
import { toast } from 'sonner'
import { ask } from '@/app/_ui/request'
import { signOut } from '@/app/_ui/sign-out'
import { switchTheme } from '@/app/_ui/theme'
import type { CommandContext, ViewChange } from '@/lib/commands'
import { Palette } from '../[workbookId]/_palette/palette'
import type { ListedWorkbook } from './row'

/** The palette where no workbook is open: what needs none is offered, and the firm's workbooks. */
export function ListPalette({
  open,
  onClose,
  workbooks,
  mayChange,
}: {
  readonly open: boolean
  readonly onClose: () => void
  readonly workbooks: readonly ListedWorkbook[]
  readonly mayChange: boolean
}) {
  const router = useRouter()
  const context = useMemo(() => contextOf(workbooks, mayChange), [workbooks, mayChange])
  return (
    <Palette
      open={open}
      onClose={onClose}
      context={context}
      onRun={(command, args) => {
        const effect = command.run(context, args)
        if (effect.kind === 'refused') return effect.text
        if (effect.kind !== 'view') return 'Open a workbook first.'
        const refused = go(effect.change, (address) => router.push(address))
        if (refused === undefined) onClose()
        return refused
      }}
    />
  )
}

function contextOf(workbooks: readonly ListedWorkbook[], mayChange: boolean): CommandContext {
  return {
    workbook: { version: 1, system: 'us', sheets: [], names: new Map() },
    system: 'us',
    selection: { sheet: '', row: 0, column: 0, rowCount: 1, columnCount: 1 },
    may: { change: mayChange, changeLocked: false },
    undoLabel: undefined,
    redoLabel: undefined,
    value: () => null,
    named: () => undefined,
    workbooks: workbooks.map(({ id, title, changed }) => ({ id, title, changed })),
  }
}

/** Does the change of view, or says why it cannot be done from the list. */
function go(change: ViewChange, goTo: (address: string) => void): string | undefined {
  switch (change.kind) {
    case 'open-workbook':
      goTo(`/workbooks/${change.workbook}`)
      return undefined
    case 'new-workbook':
      void make(change, goTo)
      return undefined
    case 'switch-theme':
      switchTheme()
      return undefined
    case 'sign-out':
      void signOut().then((done) => done.ok || toast.error(done.failure.text))
      return undefined
    case 'list-workbooks':
      return undefined
    default:
      return 'Open a workbook first.'
  }
}

async function make(
  { title, frame, system }: Extract<ViewChange, { kind: 'new-workbook' }>,
  goTo: (address: string) => void,
): Promise<void> {
  const made = await ask<{ readonly id: string }>('POST', '/api/workbooks', { title, frame, system })
  if (made.ok) goTo(`/workbooks/${made.value.id}`)
  else toast.error(made.failure.text)
}
