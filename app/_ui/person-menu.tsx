'use client'

import { Check, ChevronDown } from 'lucide-react'
import { DropdownMenu } from 'radix-ui'
import { useEffect, useState } from 'react'
import { toast } from 'sonner'
import { menuClass, menuItemClass } from './menu'
import { signOut } from './sign-out'
import { setSingleKeys, useSingleKeys } from './single-keys'
import { currentTheme, setTheme, type Theme, themeOf, themes } from './theme'

const themeWords: Record<Theme, string> = { system: 'As the device', light: 'Light', dark: 'Dark' }

/** Who is signed in and as what, how the screen looks, and the way out. */
export function PersonMenu({ name, role }: { readonly name: string; readonly role: string }) {
  const [theme, choose] = useState<Theme>('system')
  const singleKeys = useSingleKeys()
  useEffect(() => choose(currentTheme()), [])

  return (
    <DropdownMenu.Root modal={false} onOpenChange={(open) => open && choose(currentTheme())}>
      <DropdownMenu.Trigger className="flex min-h-10 items-center gap-2 rounded-soft px-3 hover:bg-[color-mix(in_srgb,var(--ink)_7%,transparent)]">
        <span className="max-w-40 truncate font-medium">{name}</span>
        <span className="text-sm text-quiet max-sm:sr-only">{role}</span>
        <span className="sr-only">your menu</span>
        <ChevronDown size={16} aria-hidden="true" className="text-quiet" />
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content align="end" sideOffset={6} className={menuClass}>
          <DropdownMenu.Label className="px-2.5 pt-1 pb-2">
            <span className="block font-semibold">{name}</span>
            <span className="block text-sm text-quiet">{role}</span>
          </DropdownMenu.Label>
          <Line />
          <DropdownMenu.Label className="px-2.5 pt-1 text-sm text-quiet">Theme</DropdownMenu.Label>
          <DropdownMenu.RadioGroup
            value={theme}
            onValueChange={(value) => {
              setTheme(themeOf(value))
              choose(themeOf(value))
            }}
          >
            {themes.map((each) => (
              <DropdownMenu.RadioItem
                key={each}
                value={each}
                className={menuItemClass}
                onSelect={(event) => event.preventDefault()}
              >
                <Tick />
                {themeWords[each]}
              </DropdownMenu.RadioItem>
            ))}
          </DropdownMenu.RadioGroup>
          <Line />
          <DropdownMenu.CheckboxItem
            checked={singleKeys}
            onCheckedChange={setSingleKeys}
            className={menuItemClass}
            onSelect={(event) => event.preventDefault()}
          >
            <Tick />
            Single-key shortcuts
          </DropdownMenu.CheckboxItem>
          <Line />
          <DropdownMenu.Item className={menuItemClass} onSelect={() => void leave()}>
            <span className="w-4" />
            Sign out
          </DropdownMenu.Item>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  )
}

async function leave(): Promise<void> {
  const done = await signOut()
  if (!done.ok) toast.error(done.failure.text)
}

function Line() {
  return <DropdownMenu.Separator className="my-1.5 h-px bg-line" />
}

function Tick() {
  return (
    <span className="grid w-4 place-items-center">
      <DropdownMenu.ItemIndicator>
        <Check size={15} aria-hidden="true" className="text-clay" />
      </DropdownMenu.ItemIndicator>
    </span>
  )
}
