'use client'

import dynamic from 'next/dynamic'
import { useRouter } from 'next/navigation'
import { useEffect, useMemo, useRef, useState } from 'react'
import { type Command, platformOf } from '@/lib/commands'
import { type Operation, sheetById } from '@/lib/workbook'
import { Editing } from '../_grid/editing'
import { GridWaiting } from '../_grid/grid-waiting'
import { rectangle, single } from '../_grid/selection'
import { useCanvasTheme } from '../_grid/use-canvas-theme'
import { Palette } from '../_palette/palette'
import { Tally } from '../_tally/tally'
import { commandContext } from './command-context'
import { EntryLine } from './entry-line'
import { type PanelShown, Panels } from './panels'
import { PhoneSteps } from './phone-steps'
import { runEffect, say, select } from './run-effect'
import type { Session } from './session'
import { SheetHead } from './sheet-head'
import { Steps } from './steps'
import { tryOutTally } from './try-out'
import { useEditorKeys } from './use-editor-keys'
import { usePalette } from './use-palette'
import { useShape, useView } from './use-session'
import { useWorkbooks } from './use-workbooks'
import { EditorView } from './view-state'

const loadGrid = () => import('../_grid/sheet-grid')
const SheetGrid = dynamic(loadGrid, { ssr: false, loading: GridWaiting })
// The grid is wanted in any case, so its code is asked for together with this.
void loadGrid()

/** The open workbook: steps, tally, the sheet, the entry line, and the palette over them. */
export function Editor({ session }: { readonly session: Session }) {
  const router = useRouter()
  const root = useRef<HTMLDivElement>(null)
  const view = useMemo(() => new EditorView(session.workbook), [session])
  const editing = useMemo(() => new Editing(session, view, say), [session, view])
  const platform = useMemo(() => platformOf(navigator.userAgent), [])
  const shape = useShape(session)
  const { sheet: shown } = useView(view)
  const colours = useCanvasTheme()
  const palette = usePalette()
  const workbooks = useWorkbooks(session.id, palette.open)
  const [note, setNote] = useState(false)
  const [panel, setPanel] = useState<PanelShown | undefined>(undefined)

  const reach = useMemo(
    () => ({
      session,
      view,
      editing,
      openPalette: palette.show,
      openPanel: setPanel,
      editNote: () => setNote(true),
      goTo: (address: string) => router.push(address),
    }),
    [session, view, editing, palette.show, router],
  )

  const context = () => {
    const { sheet, selection } = view.snapshot()
    return commandContext(session, { sheet, ...rectangle(selection) }, workbooks)
  }
  const onCommand = (command: Command) => {
    const now = context()
    const may = command.when(now)
    if (may !== true) say(may)
    else if (command.arguments?.length) palette.show(command.id)
    else {
      const done = runEffect(reach, command.run(now, {}))
      if (!done.ok) say(done.failure.text)
    }
  }
  const tryOut = useMemo(
    () => (operations: readonly Operation[]) => tryOutTally(session, operations),
    [session],
  )
  useEditorKeys(root, platform, palette.open || panel !== undefined, onCommand)

  // biome-ignore lint/correctness/useExhaustiveDependencies: a change of shape may take the sheet or the selected cell away
  useEffect(() => view.settle(session.workbook), [view, session, shape])
  useEffect(
    () =>
      session.onForeign((operations, sheets) => {
        const text = view.follow(operations, sheets)
        if (text) say(`Somebody else removed the cell you were writing. You had typed: ${text}`)
      }),
    [session, view],
  )
  useEffect(
    () =>
      session.onNews(({ kind, text, place }) => {
        if (kind !== 'moved') say(text)
        else if (place)
          select(
            { session, view },
            { ...single(place.row, place.column).active, sheet: place.sheet, rowCount: 1, columnCount: 1 },
          )
      }),
    [session, view],
  )

  const sheet = sheetById(session.workbook, shown)
  return (
    <div ref={root} className="flex h-dvh min-h-0 flex-col overflow-hidden md:flex-row">
      <PhoneSteps session={session} view={view} onPalette={() => palette.show()} />
      <Steps session={session} view={view} platform={platform} onPalette={() => palette.show()} />
      <div className="flex min-h-0 min-w-0 flex-1 flex-col">
        <Tally session={session} />
        <main className="flex min-h-0 flex-1 flex-col">
          {sheet ? (
            <>
              <SheetHead session={session} sheet={sheet} />
              <section
                aria-label={`${sheet.name} cells. F6 goes to the next part of the screen.`}
                data-region="grid"
                className="min-h-0 flex-1 border-line border-t"
              >
                {colours ? (
                  <SheetGrid
                    key={sheet.id}
                    session={session}
                    view={view}
                    editing={editing}
                    sheet={sheet}
                    colours={colours}
                    platform={platform}
                    onCommand={onCommand}
                  />
                ) : (
                  <GridWaiting />
                )}
              </section>
            </>
          ) : null}
        </main>
        <EntryLine
          session={session}
          view={view}
          editing={editing}
          note={note}
          onNoteDone={() => setNote(false)}
        />
      </div>
      <Palette
        open={palette.open}
        onClose={() => {
          palette.close()
          view.focus?.grid()
        }}
        context={context()}
        onRun={(command, args) => {
          const done = runEffect(reach, command.run(context(), args))
          return done.ok ? undefined : done.failure.text
        }}
        tryOut={tryOut}
        {...(palette.command === undefined ? {} : { begin: { command: palette.command } })}
      />
      {panel ? (
        <Panels
          panel={panel}
          session={session}
          onGo={(address) => select({ session, view }, { ...address, rowCount: 1, columnCount: 1 })}
          onClose={() => setPanel(undefined)}
          onClosed={() => {
            // Unless something else has been opened meanwhile.
            if (document.activeElement === document.body) view.focus?.grid()
          }}
        />
      ) : null}
    </div>
  )
}
