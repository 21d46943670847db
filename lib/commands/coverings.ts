import type { NamedValue } from '../workbook'
import type { ArgumentOption, ArgumentValues, CommandContext } from './command'
import { labelOf, namedInputs } from './inputs'
import { showNamed } from './measures'
import { choicesOf } from './tables'

/** Parts of the house that take a covering: the inputs called `…_covering`. */
const partWords: Readonly<Record<string, string>> = { roof: 'roof', side: 'sides', end: 'ends' }

export function coveringInputs(context: CommandContext): readonly NamedValue[] {
  return namedInputs(context).filter(({ name }) => name.endsWith('_covering'))
}

function partOf(named: NamedValue): string {
  return named.name.slice(0, -'_covering'.length)
}

export function partOptions(context: CommandContext): readonly ArgumentOption[] {
  const inputs = coveringInputs(context)
  const parts = inputs.map((named) => {
    const part = partOf(named)
    return {
      value: part,
      title: partWords[part] ?? part.replaceAll('_', ' '),
      detail: `now ${coveringTitle(context, named)}`,
      synonyms: [part, `${part} walls`, labelOf(named)],
    }
  })
  if (inputs.length < 2) return parts
  const everything = {
    value: 'all',
    title: 'the whole house',
    detail: parts.map(({ title }) => title).join(', '),
    synonyms: ['all', 'everything', 'house', 'whole'],
  }
  return [...parts, everything]
}

export function coveringTitle(context: CommandContext, named: NamedValue): string {
  const code = showNamed(context, named)
  return choicesOf(context, named)?.find(({ value }) => value === code)?.title ?? code
}

export function givenParts(context: CommandContext, args: ArgumentValues): readonly NamedValue[] {
  const inputs = coveringInputs(context)
  const part = args.part
  return part === 'all' || part === undefined ? inputs : inputs.filter((named) => partOf(named) === part)
}

/** "the roof", "the whole house": what the arguments mean, in words. */
export function sayPart({ part = 'all' }: ArgumentValues): string {
  return part === 'all' ? 'the whole house' : `the ${partWords[String(part)] ?? String(part)}`
}
