/** Classes that every menu of the app shares. */
export const menuClass =
  'z-40 min-w-56 rounded-soft border border-line bg-raised p-1.5 text-ink shadow-lift outline-none'

export const menuItemClass =
  'flex min-h-9 w-full cursor-default items-center gap-2.5 rounded-[3px] px-2.5 text-left select-none outline-none data-disabled:text-quiet data-highlighted:bg-frost'
