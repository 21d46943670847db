/** Parts of the screen that the keyboard goes round with F6. */
export const regions = ['steps', 'tally', 'grid', 'entry-line'] as const
export type Region = (typeof regions)[number]

/** What commands may ask of the pieces on the screen. */
export interface EditorFocus {
  readonly grid: () => void
  readonly entryLine: () => void
  readonly reveal: (row: number, column: number) => void
}

/** Moves the focus to the next part (or the one before); from nowhere it goes to the grid. */
export function cycleRegion(root: HTMLElement, by: -1 | 1): void {
  const parts = regions
    .map((region) => root.querySelector<HTMLElement>(`[data-region="${region}"]`))
    .filter((part): part is HTMLElement => part !== null && part.getClientRects().length > 0)
  const at = parts.findIndex((part) => part.contains(document.activeElement))
  const next =
    at < 0 ? parts.find((part) => part.dataset.region === 'grid') : parts.at((at + by) % parts.length)
  if (!next) return
  const inside = next.querySelector<HTMLElement>('[data-region-focus], canvas[tabindex="0"]')
  ;(inside ?? next).focus()
}
