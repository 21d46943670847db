'use client'

import { Ellipsis } from 'lucide-react'
import { DropdownMenu } from 'radix-ui'
import { menuClass, menuItemClass } from '@/app/_ui/menu'

export type RowAction = 'rename' | 'remove'

/** What can be done with one workbook without opening it. */
export function RowMenu({
  id,
  title,
  mayChange,
  onChoose,
}: {
  readonly id: string
  readonly title: string
  readonly mayChange: boolean
  readonly onChoose: (action: RowAction) => void
}) {
  return (
    <DropdownMenu.Root modal={false}>
      <DropdownMenu.Trigger
        aria-label={`More about ${title}`}
        className="grid size-10 place-items-center rounded-soft text-quiet hover:bg-[color-mix(in_srgb,var(--ink)_7%,transparent)] hover:text-ink"
      >
        <Ellipsis size={18} aria-hidden="true" />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content align="end" className={menuClass}>
          <DropdownMenu.Item asChild>
            <a href={`/api/workbooks/${id}/xlsx`} download className={menuItemClass}>
              Export as XLSX
            </a>
          </DropdownMenu.Item>
          {mayChange ? (
            <>
              <DropdownMenu.Item className={menuItemClass} onSelect={() => onChoose('rename')}>
                Rename…
              </DropdownMenu.Item>
              <DropdownMenu.Separator className="my-1.5 h-px bg-line" />
              <DropdownMenu.Item
                className={`${menuItemClass} text-ember`}
                onSelect={() => onChoose('remove')}
              >
                Remove…
              </DropdownMenu.Item>
            </>
          ) : null}
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  )
}
