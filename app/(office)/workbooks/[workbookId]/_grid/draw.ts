import type { DrawCellCallback, DrawHeaderCallback, Rectangle } from '@glideapps/glide-data-grid'
import type { Mark } from './cell-content'
import { type Colours, mono, sans } from './palette-colours'

export const headerHeight = 44
export const rowHeight = 28

/** What the header of a column says, by grid column. */
export interface ColumnHead {
  readonly letters: string
  readonly title: string
  /** Of the numbers in the column, when they share one. */
  readonly unit: string
  readonly right: boolean
}

/** The column's letter, small, above its title; over numbers both stand at the right. */
export function headerDrawer(heads: readonly ColumnHead[], colours: Colours): DrawHeaderCallback {
  return ({ ctx, columnIndex, rect, hasSelectedCell }) => {
    const head = heads[columnIndex]
    if (!head) return
    const right = head.right
    const x = right ? rect.x + rect.width - 9 : rect.x + 9
    ctx.save()
    ctx.textAlign = right ? 'right' : 'left'
    ctx.textBaseline = 'alphabetic'
    ctx.font = `11px ${mono}`
    ctx.fillStyle = hasSelectedCell ? colours.clay : colours.quiet
    ctx.fillText(head.letters, x, rect.y + 17)
    if (head.unit !== '') {
      const beside = 8 + head.letters.length * 7
      ctx.fillStyle = colours.quiet
      ctx.font = `11px ${sans}`
      const unit = shortened(ctx, head.unit, rect.width - 18 - beside)
      ctx.fillText(unit, right ? x - beside : x + beside, rect.y + 17)
    }
    ctx.font = `600 13px ${sans}`
    ctx.fillStyle = colours.ink
    ctx.fillText(shortened(ctx, head.title, rect.width - 18), x, rect.y + 34)
    if (hasSelectedCell) {
      ctx.fillStyle = colours.clay
      ctx.fillRect(rect.x + 1, rect.y + rect.height - 2, rect.width - 1, 2)
    }
    ctx.restore()
  }
}

function shortened(ctx: CanvasRenderingContext2D, text: string, width: number): string {
  if (ctx.measureText(text).width <= width) return text
  let end = text.length
  while (end > 1 && ctx.measureText(`${text.slice(0, end)}…`).width > width) end -= 1
  return `${text.slice(0, end).trimEnd()}…`
}

/** A mark beside the colour of a ground, so that the colour never says it alone. */
export function cellDrawer(
  markOf: (column: number, row: number) => Mark | undefined,
  isActive: (column: number, row: number) => boolean,
  colours: Colours,
): DrawCellCallback {
  return ({ ctx, rect, col, row, cell }, drawContent) => {
    if (cell.kind === 'text' && cell.contentAlign === 'right' && !roomFor(cell.displayData, rect.width)) {
      drawTooNarrow(ctx, rect, colours)
    } else drawContent()
    const mark = markOf(col, row)
    if (mark) drawMark(ctx, rect, mark, colours)
    if (isActive(col, row)) {
      ctx.strokeStyle = colours.clay
      ctx.lineWidth = 2
      ctx.strokeRect(rect.x + 1.5, rect.y + 1.5, rect.width - 2, rect.height - 2)
    }
  }
}

/** Of a digit at 13 px in the fixed-width font, whose digits are all alike. */
const digitWidth = 7.8

function roomFor(text: string, width: number): boolean {
  return text.length * digitWidth <= width - 9
}

/** A number cut off at the left would read as another number, so it is not shown at all. */
function drawTooNarrow(ctx: CanvasRenderingContext2D, rect: Rectangle, colours: Colours): void {
  ctx.save()
  ctx.fillStyle = colours.quiet
  ctx.font = `13px ${sans}`
  ctx.textAlign = 'right'
  ctx.textBaseline = 'middle'
  ctx.fillText(
    'too narrow'.length * 6 < rect.width - 12 ? 'too narrow' : '⋯',
    rect.x + rect.width - 9,
    rect.y + rect.height / 2,
  )
  ctx.restore()
}

/** The same marks as in the legend: a corner for inputs, two lines for table values, a dot for overrides. */
export function drawMark(ctx: CanvasRenderingContext2D, rect: Rectangle, mark: Mark, colours: Colours): void {
  ctx.save()
  ctx.lineWidth = 1
  const { x, y } = rect
  const right = x + rect.width
  if (mark.ground === 'input') {
    ctx.strokeStyle = colours.quiet
    ctx.beginPath()
    ctx.moveTo(x + 3.5, y + 8)
    ctx.lineTo(x + 3.5, y + 4.5)
    ctx.lineTo(x + 7, y + 4.5)
    ctx.stroke()
  } else if (mark.ground === 'table') {
    ctx.strokeStyle = colours.quiet
    ctx.beginPath()
    ctx.moveTo(x + 3, y + 4.5)
    ctx.lineTo(x + 8, y + 4.5)
    ctx.moveTo(x + 3, y + 6.5)
    ctx.lineTo(x + 8, y + 6.5)
    ctx.stroke()
  } else if (mark.ground === 'override') {
    ctx.fillStyle = colours.clay
    ctx.beginPath()
    ctx.arc(right - 6, y + 6, 3, 0, Math.PI * 2)
    ctx.fill()
  }
  if (mark.note) {
    ctx.fillStyle = colours.clay
    ctx.beginPath()
    ctx.moveTo(right - 1, y + rect.height - 7)
    ctx.lineTo(right - 1, y + rect.height - 1)
    ctx.lineTo(right - 7, y + rect.height - 1)
    ctx.fill()
  }
  ctx.restore()
}
