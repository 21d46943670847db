'use client'

import { type KeyboardEvent, useEffect, useId, useLayoutEffect, useRef, useState } from 'react'
import type { EditState } from '../_editor/view-state'
import { type EditAction, editAction } from './keys'

export interface Choice {
  readonly value: string
  readonly title: string
  readonly detail?: string
}

export interface CellEditorProps {
  readonly edit: EditState
  /** Where the cell is on the screen; follows scrolling. */
  readonly bounds: { readonly x: number; readonly y: number; readonly width: number; readonly height: number }
  readonly label: string
  readonly right: boolean
  readonly choices: readonly Choice[] | undefined
  /** False once the edit has been ended by a key. */
  readonly isOpen: () => boolean
  readonly onText: (text: string) => void
  readonly onCommit: (text: string, action: Extract<EditAction, { kind: 'commit' }>) => void
  readonly onCancel: () => void
}

/** The cell opened for writing. It stands over the cell, grows with its text, and keeps text that was refused. */
export function CellEditor(props: CellEditorProps) {
  const { edit, bounds, choices, onText, onCommit, onCancel } = props
  const input = useRef<HTMLTextAreaElement>(null)
  const id = useId()
  const listed = useListed(choices, edit)
  const [chosen, setChosen] = useState(() => matching(listed, edit.text))
  const done = useRef(false)
  const opened = useRef(performance.now())

  useLayoutEffect(() => {
    const element = input.current
    if (!element) return
    element.focus({ preventScroll: true })
    element.setSelectionRange(element.value.length, element.value.length)
  }, [])

  const commit = (action: Extract<EditAction, { kind: 'commit' }>) => {
    const option = chosen >= 0 ? listed[chosen] : undefined
    onCommit(option?.value ?? edit.text, action)
  }

  const onKeyDown = (event: KeyboardEvent<HTMLTextAreaElement>) => {
    event.stopPropagation()
    const action = editAction(pressOf(event), edit.mode, listed.length > 0)
    if (!action) return
    event.preventDefault()
    if (action.kind === 'cancel') onCancel()
    else if (action.kind === 'commit') commit(action)
    else if (action.kind === 'choose') {
      setChosen((now) => (now + action.by + listed.length) % listed.length)
    } else if (action.kind === 'newline') insertAtCaret(event.currentTarget, '\n', onText)
  }

  useEffect(() => {
    done.current = false
    return () => {
      done.current = true
    }
  }, [])

  // biome-ignore lint/correctness/useExhaustiveDependencies: typing chooses anew; the arrow keys go on from there
  useEffect(() => setChosen(matching(listed, edit.text)), [edit.text])

  const below = bounds.y + bounds.height
  return (
    <div
      className="fixed z-30"
      style={{
        left: bounds.x - 1,
        top: bounds.y - 1,
        width: 'max-content',
        maxWidth: `calc(100vw - ${bounds.x + 8}px)`,
      }}
    >
      <textarea
        ref={input}
        rows={1}
        value={edit.text}
        spellCheck={false}
        autoCapitalize="off"
        autoComplete="off"
        aria-label={props.label}
        aria-invalid={edit.error ? true : undefined}
        aria-describedby={edit.error ? `${id}-error` : undefined}
        {...(choices ? combobox(id, listed.length > 0, chosen) : {})}
        className={`block resize-none [field-sizing:content] border-2 bg-raised px-2 text-[13px] text-ink leading-5 shadow-lift outline-none ${edit.error ? 'border-ember' : 'border-clay'} ${props.right ? 'figure text-right' : ''}`}
        style={{
          minHeight: bounds.height + 2,
          minWidth: bounds.width + 2,
          maxWidth: `min(40rem, calc(100vw - ${bounds.x + 8}px))`,
          paddingBlock: (bounds.height - 22) / 2,
        }}
        onChange={(event) => {
          onText(event.target.value)
        }}
        onKeyDown={onKeyDown}
        onBlur={(event) => {
          if (!props.isOpen()) return
          // The grid takes the focus a frame after the click that opened the cell: it is given back.
          if (performance.now() - opened.current < settling && isGrid(event.relatedTarget)) {
            event.currentTarget.focus({ preventScroll: true })
            return
          }
          // Clicking elsewhere takes the text, as Enter would; refused text stays open with its reason.
          if (!done.current && !edit.error) commit({ kind: 'commit', axis: 'none', by: 0 })
        }}
      />
      {edit.error ? (
        <p
          id={`${id}-error`}
          role="alert"
          className="absolute mt-1 w-max max-w-xs rounded-soft border border-ember bg-raised px-2.5 py-1.5 text-[0.8125rem] text-ember shadow-lift"
        >
          <span aria-hidden="true">! </span>
          {edit.error}
        </p>
      ) : null}
      {listed.length > 0 ? (
        <Choices
          id={id}
          listed={listed}
          chosen={chosen}
          below={below}
          onPick={(value) => onCommit(value, { kind: 'commit', axis: 'none', by: 0 })}
        />
      ) : null}
    </div>
  )
}

const settling = 500

function isGrid(target: EventTarget | null): boolean {
  return target instanceof Element && target.closest('canvas') !== null
}

/** What ties the text to its list of choices for assistive technology. */
function combobox(id: string, open: boolean, chosen: number) {
  return {
    role: 'combobox',
    'aria-expanded': open,
    'aria-controls': `${id}-choices`,
    'aria-autocomplete': 'list',
    ...(chosen >= 0 ? { 'aria-activedescendant': `${id}-choice-${chosen}` } : {}),
  } as const
}

function Choices({
  id,
  listed,
  chosen,
  below,
  onPick,
}: {
  readonly id: string
  readonly listed: readonly Choice[]
  readonly chosen: number
  readonly below: number
  readonly onPick: (value: string) => void
}) {
  return (
    <div
      id={`${id}-choices`}
      role="listbox"
      aria-label="Choices"
      className="absolute mt-1 w-max min-w-60 max-w-[min(36rem,90vw)] overflow-y-auto rounded-soft border border-line bg-raised py-1 shadow-lift"
      style={{ maxHeight: `min(16rem, calc(100dvh - ${below + 16}px))` }}
    >
      {listed.map((choice, i) => (
        <div
          key={choice.value}
          id={`${id}-choice-${i}`}
          role="option"
          tabIndex={-1}
          aria-selected={i === chosen}
          ref={i === chosen ? (element) => element?.scrollIntoView({ block: 'nearest' }) : undefined}
          className={`flex cursor-pointer items-baseline gap-3 px-2.5 py-1 text-[0.8125rem] hover:bg-frost ${i === chosen ? 'bg-frost' : ''}`}
          // The editor must not lose the focus before the choice is taken.
          onMouseDown={(event) => {
            event.preventDefault()
            onPick(choice.value)
          }}
        >
          <span className="whitespace-nowrap">{choice.title}</span>
          {choice.title === choice.value ? null : (
            <span className="figure whitespace-nowrap text-quiet">{choice.value}</span>
          )}
          {choice.detail ? <span className="ml-auto truncate pl-4 text-quiet">{choice.detail}</span> : null}
        </div>
      ))}
    </div>
  )
}

/** All choices while the cell still says what it said; once typing has begun, those that match. */
function useListed(choices: readonly Choice[] | undefined, edit: EditState): readonly Choice[] {
  const opened = useRef(edit.mode === 'amend' ? edit.text : undefined)
  if (!choices || edit.text.startsWith('=')) return []
  const typed = edit.text.trim().toLowerCase()
  if (typed === '' || edit.text === opened.current) return choices
  return choices.filter(
    ({ value, title }) => value.toLowerCase().includes(typed) || title.toLowerCase().includes(typed),
  )
}

/** The choice that the text is, else the first of those that it leaves; none while nothing is typed. */
function matching(listed: readonly Choice[], text: string): number {
  const typed = text.trim().toLowerCase()
  if (typed === '') return -1
  const exact = listed.findIndex(({ value }) => value.toLowerCase() === typed)
  return exact >= 0 ? exact : Math.min(0, listed.length - 1)
}

function insertAtCaret(element: HTMLTextAreaElement, text: string, onText: (text: string) => void): void {
  element.setRangeText(text, element.selectionStart, element.selectionEnd, 'end')
  onText(element.value)
}

export function pressOf(event: KeyboardEvent) {
  return {
    key: event.key,
    ctrlKey: event.ctrlKey,
    metaKey: event.metaKey,
    shiftKey: event.shiftKey,
    altKey: event.altKey,
    isComposing: event.nativeEvent.isComposing,
  }
}
