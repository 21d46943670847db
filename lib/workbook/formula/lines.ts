/**
 * Where rows or columns go when some are inserted, removed or moved. Rules, for lines of one axis:
 *
 * W1  A single line keeps its content: it shifts with what is inserted or removed before it, and goes along when it is moved.
 * W2  A line that is removed has no new place.
 * W3  A range grows when lines are inserted strictly inside it; at its first line it shifts, after its last it stays.
 * W4  A range shrinks by the lines that are removed from it, and is gone when all of them are.
 * W5  A range moves along when all of it is moved; else its ends behave as if the moved lines were removed and then
 *     inserted at the new place.
 */
export type LineChange =
  | { readonly kind: 'insert'; readonly at: number; readonly count: number }
  | { readonly kind: 'remove'; readonly at: number; readonly count: number }
  /** `to` is the index, before the move, of the line that the moved ones come to stand before. */
  | { readonly kind: 'move'; readonly at: number; readonly count: number; readonly to: number }

export type Span = readonly [first: number, last: number]

/** The new index of one line, or undefined when it is removed. [W1 W2] */
export function lineAfter(change: LineChange, line: number): number | undefined {
  const { at, count } = change
  switch (change.kind) {
    case 'insert':
      return line >= at ? line + count : line
    case 'remove':
      return line < at ? line : line < at + count ? undefined : line - count
    case 'move': {
      const place = landing(change)
      if (line >= at && line < at + count) return line - at + place
      const closed = line < at ? line : line - count
      return closed >= place ? closed + count : closed
    }
  }
}

/** The new first and last line of a range, or undefined when all of it is removed. [W3 W4 W5] */
export function spanAfter(change: LineChange, [first, last]: Span): Span | undefined {
  const { at, count } = change
  switch (change.kind) {
    case 'insert':
      return [first >= at ? first + count : first, last >= at ? last + count : last]
    case 'remove': {
      const end = at + count
      const newFirst = first < at ? first : first < end ? at : first - count
      const newLast = last < at ? last : last < end ? at - 1 : last - count
      return newFirst > newLast ? undefined : [newFirst, newLast]
    }
    case 'move': {
      const place = landing(change)
      if (place === at) return [first, last]
      if (first >= at && last < at + count) return [first - at + place, last - at + place]
      const closed = spanAfter({ kind: 'remove', at, count }, [first, last])
      return closed && spanAfter({ kind: 'insert', at: place, count }, closed)
    }
  }
}

/** Index of the first moved line after the move. */
export function landing(change: {
  readonly at: number
  readonly count: number
  readonly to: number
}): number {
  return change.to > change.at ? change.to - change.count : change.to
}

/** The change that puts the lines back; what a removal lost is the caller's to restore. */
export function undoneBy(change: LineChange): LineChange {
  const { at, count } = change
  switch (change.kind) {
    case 'insert':
      return { kind: 'remove', at, count }
    case 'remove':
      return { kind: 'insert', at, count }
    case 'move': {
      const place = landing(change)
      return { kind: 'move', at: place, count, to: place < at ? at + count : at }
    }
  }
}
