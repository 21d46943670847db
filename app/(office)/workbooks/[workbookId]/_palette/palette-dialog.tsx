'use client'

import { Command as List } from 'cmdk'
import { Dialog } from 'radix-ui'
import { type KeyboardEvent, useRef, useState } from 'react'
import { chordOf } from '@/lib/commands'
import { Entries } from './entries'
import { Footer } from './footer'
import { Line } from './line'
import { Nothing } from './nothing'
import { Options } from './options'
import type { PaletteProps } from './palette-props'
import { usePlatform } from './platform'
import { Preview } from './preview'
import { useAnnounced } from './use-announced'
import { usePalette } from './use-palette'
import { useTrials } from './use-trials'

/**
 * The palette on the screen. The list is cmdk's (arrow keys, pointer, options), its filter, its sorting and its
 * letter keys are off: order, arguments and what Enter does are decided in `use-palette`.
 */
export function PaletteDialog(props: PaletteProps) {
  const { context, onClose } = props
  const platform = usePlatform()
  const palette = usePalette(props)
  const trials = useTrials(palette, props)
  const input = useRef<HTMLInputElement>(null)
  const list = useRef<HTMLDivElement>(null)
  // Asked while rendering for the first time: the input takes the keyboard as soon as it is there.
  const [came] = useState(() => document.activeElement)
  const moving = useRef(false)
  const announced = useAnnounced(palette)

  function onKeyDown(event: KeyboardEvent) {
    // Enter, Tab and Esc belong to the composing of a letter while it lasts.
    if (event.nativeEvent.isComposing || event.keyCode === 229) return
    const chord = chordOf(event.nativeEvent, platform)
    moving.current = event.key === 'ArrowDown' || event.key === 'ArrowUp'
    if (chord === 'Mod+K') onClose()
    else if (chord === 'Enter') palette.accept()
    else if (chord === 'Tab') palette.advance()
    else if (chord === 'Shift+Tab' && palette.stage.kind === 'fill') palette.back()
    else if (chord === 'Backspace' && palette.value === '' && palette.stage.kind === 'fill') palette.back()
    else if (event.key !== 'Enter' && event.key !== 'Tab') return
    event.preventDefault()
  }

  return (
    <Dialog.Root open onOpenChange={(open) => open || onClose()}>
      <Dialog.Portal>
        <Dialog.Overlay className="fixed inset-0 z-40 bg-veil" />
        <Dialog.Content
          aria-describedby={undefined}
          className="fixed top-[min(6.5rem,8vh)] left-1/2 z-50 flex max-h-[84vh] w-[min(44rem,calc(100vw-1rem))] -translate-x-1/2 flex-col overflow-hidden rounded-soft border border-line bg-raised text-ink shadow-lift"
          onCloseAutoFocus={(event) => {
            event.preventDefault()
            giveBack(came)
          }}
          onEscapeKeyDown={(event) => {
            event.preventDefault()
            if (!event.isComposing) palette.back()
          }}
        >
          <Dialog.Title className="sr-only">Find a command, a sheet or a value</Dialog.Title>
          <List
            shouldFilter={false}
            vimBindings={false}
            loop
            value={palette.active ?? ''}
            onValueChange={(value) => {
              // cmdk also reports what it selects by itself; only a person's move counts.
              if (moving.current) palette.pick(value)
              moving.current = false
            }}
            onKeyDown={onKeyDown}
            className="flex min-h-0 flex-col"
          >
            <Line ref={input} list={list} palette={palette} context={context} />
            <List.List
              ref={list}
              label={palette.options ? 'Choices' : 'Commands, sheets and values'}
              hidden={!palette.listed || palette.empty}
              className="max-h-[26rem] min-h-0 overflow-y-auto overscroll-contain border-line border-t py-1.5 [scroll-padding-block:2.25rem]"
              onPointerMoveCapture={() => {
                moving.current = true
              }}
              onPointerDown={(event) => event.preventDefault()}
            >
              {palette.stage.kind === 'find' ? (
                <Entries palette={palette} context={context} platform={platform} />
              ) : (
                <Options palette={palette} context={context} trials={trials} />
              )}
            </List.List>
            {palette.empty ? <Nothing palette={palette} /> : null}
            {!palette.listed ? (
              <Preview context={context} changes={trials.changes} waiting={trials.waiting} />
            ) : null}
            <Footer palette={palette} context={context} trials={trials} platform={platform} />
          </List>
          <p role="status" className="sr-only">
            {announced}
          </p>
        </Dialog.Content>
      </Dialog.Portal>
    </Dialog.Root>
  )
}

/** Focus returns to where it was, unless the command has put it elsewhere. */
function giveBack(element: Element | null) {
  const { activeElement, body } = document
  if (activeElement !== null && activeElement !== body) return
  if (element instanceof HTMLElement && element.isConnected) element.focus({ preventScroll: true })
}
