import { Mark } from '@/app/_ui/mark'

/** The shape of the screen while the workbook is on its way. */
export function Opening() {
  return (
    <div className="flex h-dvh flex-col overflow-hidden md:flex-row" aria-busy="true">
      <div className="hidden w-[13.5rem] shrink-0 border-line border-r px-4 pt-3.5 md:block">
        <span className="inline-flex items-center gap-2.5 font-semibold">
          <Mark />
          Panewright
        </span>
        <p role="status" className="mt-3 text-quiet">
          Opening the workbook …
        </p>
      </div>
      <div className="flex min-w-0 flex-1 flex-col">
        <div className="h-[5.25rem] shrink-0 border-line border-b" />
        <p className="px-4 py-3 text-quiet md:hidden">Opening the workbook …</p>
        <div className="flex-1" />
        <div className="h-16 shrink-0 border-line border-t bg-raised" />
      </div>
    </div>
  )
}
