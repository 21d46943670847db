'use client'

import { useRouter } from 'next/navigation'
import { type FormEvent, useState } from 'react'
import { toast } from 'sonner'
import { Button } from '@/app/_ui/button'
import { Dialog } from '@/app/_ui/dialog'
import { ask } from '@/app/_ui/request'
import { TextField } from '@/app/_ui/text-field'
import type { ListedWorkbook } from './row'
import type { RowAction } from './row-menu'

/** The question that goes with the chosen action on one workbook. */
export function RowDialogs({
  chosen,
  onDone,
}: {
  readonly chosen: { readonly action: RowAction; readonly workbook: ListedWorkbook } | undefined
  readonly onDone: () => void
}) {
  if (!chosen) return null
  const { action, workbook } = chosen
  return (
    <Dialog
      open
      onOpenChange={(open) => open || onDone()}
      title={action === 'rename' ? 'Rename the workbook' : `Remove ${workbook.title}?`}
      {...(action === 'remove'
        ? { about: 'It leaves the list for everybody in the firm, and nobody can open it any more.' }
        : {})}
    >
      {action === 'rename' ? (
        <Rename workbook={workbook} onDone={onDone} />
      ) : (
        <Remove workbook={workbook} onDone={onDone} />
      )}
    </Dialog>
  )
}

interface Props {
  readonly workbook: ListedWorkbook
  readonly onDone: () => void
}

function Rename({ workbook, onDone }: Props) {
  const router = useRouter()
  const [error, setError] = useState<string>()

  async function submit(event: FormEvent<HTMLFormElement>): Promise<void> {
    event.preventDefault()
    const title = String(new FormData(event.currentTarget).get('title') ?? '').trim()
    if (title === '') return setError('Give it a title, so that it can be found again.')
    const done = await ask('PATCH', `/api/workbooks/${workbook.id}`, { title })
    if (!done.ok) return setError(done.failure.text)
    onDone()
    router.refresh()
  }

  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="grid gap-5">
      <TextField
        label="Title"
        name="title"
        maxLength={120}
        autoComplete="off"
        defaultValue={workbook.title}
        onFocus={(event) => event.currentTarget.select()}
        error={error}
        required
      />
      <div className="flex justify-end gap-3">
        <Button onClick={onDone}>Cancel</Button>
        <Button type="submit" tone="action">
          Rename
        </Button>
      </div>
    </form>
  )
}

function Remove({ workbook, onDone }: Props) {
  const router = useRouter()
  const [busy, setBusy] = useState(false)

  async function remove(): Promise<void> {
    setBusy(true)
    const done = await ask('DELETE', `/api/workbooks/${workbook.id}`)
    setBusy(false)
    if (!done.ok) return void toast.error(done.failure.text)
    onDone()
    toast(`${workbook.title} is removed.`)
    router.refresh()
  }

  return (
    <div className="flex justify-end gap-3">
      <Button onClick={onDone}>Keep it</Button>
      <Button tone="danger" disabled={busy} onClick={() => void remove()}>
        Remove
      </Button>
    </div>
  )
}
