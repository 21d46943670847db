import { type ConfigParams, HyperFormula } from 'hyperformula'
import { limits } from '../limits'
import { DecimalFunctions } from './functions'
import { registerTextBounds } from './text-bounds'

/** Function that the engine puts around formulas which could give more than one value. */
export const oneValue = 'ONE_VALUE'

let registered = false

/** Registers our functions once for the process; a plug-in under a built-in name replaces it in every later instance. */
export function registerFunctions(): void {
  if (registered) return
  registered = true
  registerTextBounds()
  HyperFormula.registerFunctionPlugin(DecimalFunctions, { enGB: { [oneValue]: oneValue } })
}

/**
 * 15 significant digits (`precisionRounding` counts from 0), so that 12345678901.23 + 0.01 keeps its cents; blanks count as 0;
 * day 0 is 1899-12-30 without a 29 February 1900, as OpenFormula has it; texts in criteria are plain, never patterns of code.
 */
export const engineConfig: Partial<ConfigParams> = {
  licenseKey: 'gpl-v3',
  useColumnIndex: true,
  precisionRounding: 14,
  evaluateNullToZero: true,
  leapYear1900: false,
  useRegularExpressions: false,
  useWildcards: true,
  maxRows: limits.rows,
  maxColumns: limits.columns,
  undoLimit: 1,
}
