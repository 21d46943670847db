import { DetailedCellError, type CellValue as EngineValue } from 'hyperformula'
import { applyOperation } from '../apply/apply-operation'
import type { CellAddress, Engine, PackedChanges } from '../contracts'
import { limits } from '../limits'
import { cellAt } from '../lookup'
import { type CellError, type CellValue, isFormula, type NamedValue, type Workbook } from '../model'
import type { Operation } from '../operations'
import { fromJson, toJson, type WorkbookJson } from '../serial'
import { ValueCache } from '../values/cache'
import { ChangePacker } from '../values/packed'
import { cyclePath, pathText } from './cycle'
import { followOperation } from './follow'
import { buildGrid, engineAddress, type Grid } from './grid'
import { describeError } from './sentences'
import { withoutEngine } from './without-engine'

export interface EngineOptions {
  /** Formula texts that are not computed because they were stopped before. */
  readonly stopped?: Iterable<string>
  /** Told why the formula engine had to be built anew, for the log. */
  readonly onRebuild?: (cause: unknown) => void
}

/**
 * The computing half of a workbook. Keeps its own copy of the model; feed it the operations that the workbook got, in order.
 *
 * E10 Nothing that a person typed makes it throw. What the formula engine throws leads to a rebuild from the model; if that
 *     fails too, the formulas that came last are stopped; if even that fails, every formula shows that it was stopped.
 * E11 After any list of operations the values are those of an engine built from the final model.
 */
export function createEngine(source: Workbook | WorkbookJson, options: EngineOptions = {}): Engine {
  return new WorkbookEngine(source, new Set(options.stopped), options.onRebuild ?? ignore)
}

/** A value of the formula engine, or the error of a formula that it never got. */
type Raw = EngineValue | CellError
type Changes = (address: CellAddress, value: Raw) => void

/** Circles whose path is looked for in one list of changes; the others are named without it. */
const mostCircles = 20

class WorkbookEngine implements Engine {
  private readonly workbook: Workbook
  private grid: Grid | undefined
  private destroyed = false
  private circlesLeft = 0
  /** What was tried out last and is still in: the operations that take it back, and the formulas that were stopped before. */
  private trial: { readonly back: readonly Operation[]; readonly stopped: readonly string[] } | undefined

  constructor(
    source: Workbook | WorkbookJson,
    private readonly stopped: Set<string>,
    private readonly onRebuild: (cause: unknown) => void,
  ) {
    this.workbook = fromJson(isWorkbook(source) ? toJson(source) : source)
    this.rebuild([])
  }

  apply(operations: readonly Operation[]): PackedChanges {
    this.settle()
    const packer = new ChangePacker()
    this.circlesLeft = mostCircles
    if (operations.every(({ kind }) => kind === 'set-cells') || operations.length === 1) {
      const changed: [CellAddress, Raw][] = []
      this.step(operations, (address, value) => changed.push([address, value]))
      for (const [address, value] of changed) this.add(packer, address, value)
      return packer.pack()
    }
    const changed = this.applyMany(operations)
    changed.each((address) => this.add(packer, address, this.raw(address)))
    return packer.pack()
  }

  /** Marks the cells that changed; those of an earlier operation move with the lines that a later one moves. */
  private applyMany(operations: readonly Operation[]): ValueCache {
    const changed = new ValueCache()
    for (const operation of operations) {
      this.step(
        [operation],
        (address) => changed.set(address, true),
        () => changed.follow(operation),
      )
    }
    return changed
  }

  all(): PackedChanges {
    this.settle()
    const packer = new ChangePacker()
    this.circlesLeft = mostCircles
    this.eachValue((address, value) => {
      if (value !== null) this.add(packer, address, value)
    })
    return packer.pack()
  }

  value(address: CellAddress): CellValue {
    this.settle()
    return this.valueOf(address)
  }

  private valueOf(address: CellAddress): CellValue {
    this.circlesLeft = 1
    return this.worded(address, this.raw(address))
  }

  named(name: string): readonly CellValue[] | undefined {
    this.settle()
    return this.read(name)
  }

  private read(name: string): readonly CellValue[] | undefined {
    const named = this.workbook.names.get(name)
    if (!named) return undefined
    const { area } = named
    const values: CellValue[] = []
    for (let row = area.row; row < area.row + area.rowCount; row += 1) {
      for (let column = area.column; column < area.column + area.columnCount; column += 1) {
        values.push(this.valueOf({ sheet: area.sheet, row, column }))
      }
    }
    return values
  }

  tryOut(operations: readonly Operation[], names: readonly string[]): Record<string, readonly CellValue[]> {
    const values = this.tryNext(operations, names)
    this.settle()
    return values
  }

  tryNext(operations: readonly Operation[], names: readonly string[]): Record<string, readonly CellValue[]> {
    const back = this.trial?.back ?? []
    const stopped = this.trial?.stopped ?? [...this.stopped]
    let inverses: readonly (readonly Operation[] | undefined)[]
    if (operations.length > 0 && [...back, ...operations].every(({ kind }) => kind === 'set-cells')) {
      inverses = this.step([...back, ...operations], ignore).slice(back.length)
    } else {
      this.settle()
      inverses = operations.flatMap((operation) => this.step([operation], ignore))
    }
    this.trial = { back: inverses.toReversed().flatMap((inverse) => inverse ?? []), stopped }
    const values: Record<string, readonly CellValue[]> = {}
    for (const name of inverses.includes(undefined) ? [] : names) {
      const list = this.read(name)
      if (list) values[name] = list
    }
    return values
  }

  /** Takes back what was tried out last. */
  private settle(): void {
    const { trial } = this
    if (!trial) return
    this.trial = undefined
    for (const operation of trial.back) this.step([operation], ignore)
    this.stopped.clear()
    for (const formula of trial.stopped) this.stopped.add(formula)
  }

  destroy(): void {
    this.destroyed = true
    this.grid?.formulas.destroy()
    this.grid = undefined
  }

  /**
   * Operations on model and grid: one, or several `set-cells` that are computed together. A refused one changes nothing, as it
   * did where it was made. Returns what takes each back, undefined for one that was refused.
   */
  private step(
    operations: readonly Operation[],
    changes: Changes,
    applied: () => void = ignore,
  ): readonly (readonly Operation[] | undefined)[] {
    if (this.destroyed) throw new Error('the engine was destroyed')
    const names = new Map(this.workbook.names)
    const inverses: (readonly Operation[] | undefined)[] = []
    const touched: CellAddress[] = []
    for (const operation of operations) {
      const result = applyOperation(this.workbook, operation)
      inverses.push(result.ok ? result.value.inverse : undefined)
      if (!result.ok) continue
      for (const cell of result.value.touched) touched.push(cell)
      applied()
    }
    const last = operations.at(-1)
    if (last && inverses.some(Boolean)) this.follow(last, touched, names, changes)
    return inverses
  }

  private follow(
    operation: Operation,
    touched: readonly CellAddress[],
    names: ReadonlyMap<string, NamedValue>,
    changes: Changes,
  ): void {
    if (this.grid) {
      try {
        const follower = { grid: this.grid, workbook: this.workbook, stopped: this.stopped }
        if (followOperation(follower, operation, touched, names, changes)) return
      } catch (cause) {
        // The formula engine is in an unknown state: it is built anew below.
        this.onRebuild(cause)
      }
    }
    this.rebuild(touched)
    for (const address of touched) changes(address, this.raw(address))
    this.eachValue(changes)
  }

  /** Builds from the model; stops the formulas at `suspects` when that fails, and all when it fails again. [E10] */
  private rebuild(suspects: readonly CellAddress[]): void {
    try {
      this.grid?.formulas.destroy()
    } catch {
      // A broken instance is dropped all the same.
    }
    this.grid = this.tryBuild()
    if (this.grid) return
    for (const address of suspects) {
      const input = cellAt(this.workbook, address)?.input
      if (isFormula(input)) this.stopped.add(input)
    }
    if (suspects.length > 0) this.grid = this.tryBuild()
  }

  private tryBuild(): Grid | undefined {
    try {
      return buildGrid(this.workbook, this.stopped)
    } catch {
      return undefined
    }
  }

  private eachValue(visit: Changes): void {
    for (const sheet of this.workbook.sheets) {
      sheet.rows.forEach((cells, row) => {
        cells?.forEach((cell, column) => {
          if (cell?.input === undefined) return
          const address = { sheet: sheet.id, row, column }
          visit(address, this.raw(address))
        })
      })
    }
  }

  private raw(address: CellAddress): Raw {
    if (!this.grid) return withoutEngine(cellAt(this.workbook, address)?.input)
    const at = engineAddress(this.grid, address)
    if (!at) return null
    try {
      return this.grid.formulas.getCellValue(at)
    } catch (cause) {
      this.onRebuild(cause)
      this.rebuild([])
      return this.grid
        ? this.grid.formulas.getCellValue(at)
        : withoutEngine(cellAt(this.workbook, address)?.input)
    }
  }

  private add(packer: ChangePacker, address: CellAddress, value: Raw): void {
    packer.add(address.sheet, address.row, address.column, this.worded(address, value))
  }

  /** A value as the product shows it: no NaN, no minus zero, no endless text, errors in words. */
  private worded(address: CellAddress, value: Raw): CellValue {
    if (typeof value === 'number') return Number.isFinite(value) && value !== 0 ? value : 0
    if (typeof value === 'string' && value.length > limits.textLength) {
      return { error: '#VALUE!', text: `The text would have more than ${limits.textLength} characters.` }
    }
    if (!(value instanceof DetailedCellError)) return value
    if (value.value === '#CYCLE!' && this.circlesLeft > 0) {
      this.circlesLeft -= 1
      return { error: value.value, text: this.circleText(address) }
    }
    return describeError(this.workbook, address, value, this.stopped)
  }

  private circleText(address: CellAddress): string {
    const path = cyclePath(this.workbook, address, (cell) => {
      const value = this.raw(cell)
      return value instanceof DetailedCellError && value.value === '#CYCLE!'
    })
    return path
      ? `The formula depends on its own result: ${pathText(this.workbook, path)}.`
      : 'The formula reads cells that depend on their own results.'
  }
}

function ignore(): void {}

function isWorkbook(source: Workbook | WorkbookJson): source is Workbook {
  return source.names instanceof Map
}
