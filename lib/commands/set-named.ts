import type { NamedValue, Operation } from '../workbook'
import { sheetIsOpen } from './availability'
import type { ArgumentOption, CommandContext, Effect } from './command'
import { labelOf, setArea } from './inputs'
import { readValues } from './measures'
import { choicesOf } from './tables'

/** Sets every one of `inputs` to what was typed or picked; refused whole when one of them may not be set. */
export function setNamed(
  context: CommandContext,
  inputs: readonly NamedValue[],
  given: string | number | boolean,
  label: string,
): Effect {
  const operations: Operation[] = []
  for (const named of inputs) {
    const open = sheetIsOpen(context, named.area.sheet)
    if (open !== true) return refused(open)
    const options = choicesOf(context, named)
    if (options) {
      const picked = options.find((option) => option.value === String(given))
      if (!picked) return refused(`${labelOf(named)} takes one of: ${few(options)}`)
      operations.push(setArea(named.area, [ofKind(named, picked.value)]))
      continue
    }
    const read = typeof given === 'string' ? readValues(context, named, given) : undefined
    if (read && !read.ok) return refused(read.failure.text)
    operations.push(setArea(named.area, read?.value ?? [given]))
  }
  return { kind: 'operations', label, operations }
}

/** Choices are written as text; true / false and whole numbers go into the cell as what they are. */
function ofKind(named: NamedValue, value: string): string | number | boolean {
  if (named.quantity === 'boolean') return value === 'true'
  if (named.quantity === 'text' || value.trim() === '') return value
  const number = Number(value)
  return Number.isFinite(number) ? number : value
}

function few(options: readonly ArgumentOption[]): string {
  const shown = options.slice(0, 8).map(({ value }) => value)
  return shown.join(', ') + (options.length > shown.length ? ', …' : '')
}

export function refused(text: string): Extract<Effect, { kind: 'refused' }> {
  return { kind: 'refused', text }
}
