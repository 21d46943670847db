import { z } from 'zod'
import { quantities, unitSystems } from '../units/quantities'
import { limits } from './limits'

/**
 * Every way a workbook changes. Payloads are logged, so a kind is never renamed and a changed payload gets a new kind.
 * All indexes are from 0. Schemas are strict: an unknown key is refused.
 */
const index = (below: number) =>
  z
    .int()
    .min(0)
    .max(below - 1)
const rowIndex = index(limits.rows)
const columnIndex = index(limits.columns)
const lineIndex = index(limits.rows)
const sheetId = z.string().regex(/^[a-z0-9][a-z0-9-]{0,63}$/)

export const sheetNameSchema = z
  .string()
  .min(1)
  .max(limits.sheetNameLength)
  .regex(/^[^:\\/?*[\]'\p{Cc}]+$/u)
  .refine((name) => name === name.trim(), 'no space at either end')

export const valueNameSchema = z
  .string()
  .min(1)
  .max(limits.nameLength)
  .regex(/^[a-z][a-z0-9_]*$/)

const cellInput = z.union([z.string().max(limits.textLength), z.number(), z.boolean()])
const quantity = z.enum(quantities)

export const cellFormatSchema = z.strictObject({
  quantity: quantity.optional(),
  digits: z.int().min(0).max(10).optional(),
  unit: z.string().max(40).optional(),
  style: z.enum(['heading', 'total', 'quiet']).optional(),
  choices: z.union([z.string().max(limits.nameLength), z.array(z.string().max(200)).max(200)]).optional(),
})

/** A part that is absent stays as it is; `null` clears it. */
export const cellPatchSchema = z.strictObject({
  row: rowIndex,
  column: columnIndex,
  input: cellInput.nullable().optional(),
  format: cellFormatSchema.nullable().optional(),
  note: z.string().max(limits.noteLength).nullable().optional(),
  ground: z.enum(['input', 'table', 'override', 'label']).nullable().optional(),
})

const axis = z.enum(['row', 'column'])
const count = z.int().min(1).max(limits.rows)

export const areaSchema = z.strictObject({
  sheet: sheetId,
  row: rowIndex,
  column: columnIndex,
  rowCount: z.int().min(1).max(limits.rows),
  columnCount: z.int().min(1).max(limits.columns),
})

export const operationSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('set-cells'),
    sheet: sheetId,
    cells: z.array(cellPatchSchema).min(1).max(limits.cellsInOperation),
    /** The system that the numbers are written in, where that is not the workbook's any more; absent, they are in the workbook's. */
    system: z.enum(unitSystems).optional(),
  }),
  /** New blank rows or columns; the first of them gets the index `at`. */
  z.strictObject({
    kind: z.literal('insert-lines'),
    sheet: sheetId,
    axis,
    at: z.int().min(0).max(limits.rows),
    count,
  }),
  z.strictObject({ kind: z.literal('remove-lines'), sheet: sheetId, axis, at: lineIndex, count }),
  /** Moves `count` lines from `at` so that they come to stand before the line that had index `to` (never inside themselves). */
  z.strictObject({
    kind: z.literal('move-lines'),
    sheet: sheetId,
    axis,
    at: lineIndex,
    count,
    to: z.int().min(0).max(limits.rows),
  }),
  z.strictObject({
    kind: z.literal('add-sheet'),
    sheet: sheetId,
    name: sheetNameSchema,
    at: index(limits.sheets),
    sheetKind: z.enum(['step', 'table']),
    about: z.string().max(300).optional(),
    lock: z.string().max(300).optional(),
    rowCount: z.int().min(1).max(limits.rows),
    columns: z
      .array(
        z.strictObject({
          width: z.number().min(24).max(1200).optional(),
          quantity: quantity.optional(),
        }),
      )
      .min(1)
      .max(limits.columns),
  }),
  z.strictObject({ kind: z.literal('remove-sheet'), sheet: sheetId }),
  z.strictObject({ kind: z.literal('rename-sheet'), sheet: sheetId, name: sheetNameSchema }),
  z.strictObject({ kind: z.literal('reorder-sheet'), sheet: sheetId, to: index(limits.sheets) }),
  /** Names an area, moves the name there, or (with `target: null`) takes the name away. */
  z.strictObject({
    kind: z.literal('name-value'),
    name: valueNameSchema,
    target: z
      .strictObject({
        area: areaSchema,
        quantity,
        role: z.enum(['input', 'result', 'constant', 'table']),
        label: z.string().max(200).optional(),
      })
      .nullable(),
  }),
  /**
   * Sets how many rows and columns a sheet has; never fewer than hold a cell, a column's width or quantity, or a named value.
   * It moves nothing, so it is how a sheet that grew by typing goes back without touching what others did there.
   */
  z.strictObject({
    kind: z.literal('set-extent'),
    sheet: sheetId,
    rowCount: z.int().min(1).max(limits.rows),
    columnCount: z.int().min(1).max(limits.columns),
  }),
  /**
   * Writes every number of a quantity, and the cell called `unit_system`, in the other system. `exact` are numbers as they stood
   * there before, for those few that converting does not bring back to the last bit; an entry that says anything else is passed over.
   */
  z.strictObject({
    kind: z.literal('convert-units'),
    system: z.enum(unitSystems),
    exact: z
      .array(z.strictObject({ sheet: sheetId, row: rowIndex, column: columnIndex, value: z.number() }))
      .max(limits.cells)
      .optional(),
  }),
  /** Widths and quantities of columns, by index. */
  z.strictObject({
    kind: z.literal('set-columns'),
    sheet: sheetId,
    columns: z
      .array(
        z.strictObject({
          column: columnIndex,
          width: z.number().min(24).max(1200).nullable().optional(),
          quantity: quantity.nullable().optional(),
        }),
      )
      .min(1)
      .max(limits.columns),
  }),
])

export type Operation = z.infer<typeof operationSchema>
export type OperationKind = Operation['kind']
export type CellPatch = z.infer<typeof cellPatchSchema>
