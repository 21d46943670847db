import { randomBytes } from 'node:crypto'
import { rename, rm, writeFile } from 'node:fs/promises'
import { basename, dirname, join } from 'node:path'
import { fail, type Result, succeed } from '../../failures'
import { type CutsJson, toCutsJson } from '../../glazing'
import { loadIntegerProgram } from '../../glazing/cutting/highs.node'
import type { Engine, Workbook } from '../../workbook'
import { quoted } from '../nearest'
import { layOutWorkbook } from './lay-out-workbook'

export async function cutsOf(made: {
  readonly workbook: Workbook
  readonly engine: Engine
}): Promise<Result<CutsJson>> {
  const layout = layOutWorkbook(made.workbook, made.engine, await loadIntegerProgram())
  return layout.ok ? succeed(toCutsJson(layout.value)) : layout
}

/** Under another name first: a file of that name is either the whole list or what it was before. */
export async function writeCuts(cuts: CutsJson, path: string): Promise<Result<void>> {
  const partial = join(dirname(path), `.${basename(path)}.${randomBytes(6).toString('hex')}.part`)
  try {
    await writeFile(partial, `${JSON.stringify(cuts)}\n`, { flag: 'wx' })
    await rename(partial, path)
    return succeed(undefined)
  } catch (error) {
    await rm(partial, { force: true })
    if (error instanceof Error && 'code' in error && 'syscall' in error)
      return fail(
        'invalid',
        `Expected a place where the cuts can be written: ${quoted(path)} (${error.code}).`,
      )
    throw error
  }
}
