/** What one line of the report says. A goal is a bound on `value`; a line without one is there to be read beside the others. */
export interface Line {
  readonly section: string
  readonly what: string
  readonly value: number
  readonly unit: 'ratio' | 'ms' | 'kB' | 'bytes' | 'MB' | 'per second'
  readonly goal?: { readonly most: number } | { readonly least: number }
  /** The raw numbers that the value comes from. */
  readonly raw: string
}

const digits: Record<Line['unit'], number> = {
  ratio: 3,
  ms: 1,
  kB: 1,
  bytes: 0,
  MB: 1,
  'per second': 0,
}

function say(value: number, unit: Line['unit']): string {
  return unit === 'ratio' ? value.toFixed(digits.ratio) : `${value.toFixed(digits[unit])} ${unit}`
}

export function sayGoal(line: Line): string {
  if (!line.goal) return '-'
  return 'most' in line.goal ? `<= ${line.goal.most}` : `>= ${line.goal.least}`
}

/** "met", or how far off: as a share of the goal, or in the line's own unit when the goal is nought. */
export function verdict(line: Line): string {
  if (!line.goal) return ''
  const [bound, short] =
    'most' in line.goal
      ? [line.goal.most, line.value - line.goal.most]
      : [line.goal.least, line.goal.least - line.value]
  if (short <= 0) return 'met'
  return `falls short by ${bound === 0 ? say(short, line.unit) : `${((100 * short) / bound).toFixed(0)} %`}`
}

export function printLines(lines: readonly Line[]): void {
  const table = [
    ['section', 'what', 'value', 'goal', '', 'raw numbers'],
    ...lines.map((line) => [
      line.section,
      line.what,
      say(line.value, line.unit),
      sayGoal(line),
      verdict(line),
      line.raw,
    ]),
  ]
  const widths = table[0]?.map((_, i) => Math.max(...table.map((cells) => cells[i]?.length ?? 0))) ?? []
  for (const cells of table) {
    console.log(
      cells.map((text, i) => (i === cells.length - 1 ? text : text.padEnd(widths[i] ?? 0))).join('  '),
    )
  }
}
