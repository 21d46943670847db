'use client'

import { useRouter } from 'next/navigation'
import { type FormEvent, useState } from 'react'
import { Button } from '@/app/_ui/button'
import { Dialog } from '@/app/_ui/dialog'
import { ask } from '@/app/_ui/request'
import { TextField } from '@/app/_ui/text-field'
import { type Choice, ChoiceCards } from './choice-cards'
import { FrameOutline, newFrames } from './frame-outline'

const frames: readonly Choice[] = newFrames.map((frame) => ({
  ...frame,
  picture: <FrameOutline frame={frame.value} />,
}))

const systems: readonly Choice[] = [
  { value: 'us', title: 'US customary', detail: 'ft, in, °F, Btu/h' },
  { value: 'si', title: 'Metric (SI)', detail: 'm, mm, °C, W' },
]

/** Asks for the three things that cannot be changed by typing in a cell later on, and opens the new workbook. */
export function NewWorkbook({
  open,
  onOpenChange,
}: {
  readonly open: boolean
  readonly onOpenChange: (open: boolean) => void
}) {
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="New workbook"
      about="It opens with the usual sheets and prices filled in."
    >
      <NewWorkbookForm onCancel={() => onOpenChange(false)} />
    </Dialog>
  )
}

function NewWorkbookForm({ onCancel }: { readonly onCancel: () => void }) {
  const router = useRouter()
  const [frame, setFrame] = useState('gable')
  const [system, setSystem] = useState('us')
  const [busy, setBusy] = useState(false)
  const [error, setError] = useState<{ readonly field: 'title' | 'form'; readonly text: string }>()

  async function submit(event: FormEvent<HTMLFormElement>): Promise<void> {
    event.preventDefault()
    const field = event.currentTarget.elements.namedItem('title')
    const title = field instanceof HTMLInputElement ? field.value.trim() : ''
    if (title === '') {
      setError({ field: 'title', text: 'Give it a title, so that it can be found again.' })
      if (field instanceof HTMLInputElement) field.focus()
      return
    }
    setBusy(true)
    const made = await ask<{ readonly id: string }>('POST', '/api/workbooks', { title, frame, system })
    if (made.ok) return router.push(`/workbooks/${made.value.id}`)
    setBusy(false)
    setError({ field: made.failure.name === 'title' ? 'title' : 'form', text: made.failure.text })
  }

  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="grid gap-5">
      <TextField
        label="Title"
        name="title"
        maxLength={120}
        autoComplete="off"
        example="The house and whose it is, such as Heron Slough growing house"
        error={error?.field === 'title' ? error.text : undefined}
        required
      />
      <ChoiceCards label="Frame" choices={frames} value={frame} onChange={setFrame} />
      <ChoiceCards label="Units" choices={systems} value={system} onChange={setSystem} />
      {error?.field === 'form' ? (
        <p role="alert" className="text-ember">
          <span aria-hidden="true">! </span>
          {error.text}
        </p>
      ) : null}
      <div className="flex flex-wrap justify-end gap-3">
        <Button onClick={onCancel}>Cancel</Button>
        <Button type="submit" tone="action" disabled={busy}>
          {busy ? 'Making it' : 'Make the workbook'}
        </Button>
      </div>
    </form>
  )
}
