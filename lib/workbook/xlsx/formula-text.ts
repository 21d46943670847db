import { fileText } from './cell-text'

/**
 * Functions added after the first edition of the file format carry this prefix in files (ECMA-376 leaves room for them;
 * list from memory of the published "future functions", those that the engine knows).
 */
const prefix = '_xlfn.'
const prefixed = new Set(
  `ACOT ACOTH ARABIC BASE BETA.DIST BETA.INV BINOM.DIST BINOM.INV BITAND BITLSHIFT BITOR BITRSHIFT BITXOR CEILING.MATH
  CHISQ.DIST CHISQ.DIST.RT CHISQ.INV CHISQ.INV.RT CHISQ.TEST COMBINA CONCAT CONFIDENCE.NORM CONFIDENCE.T COT COTH
  COVARIANCE.P COVARIANCE.S CSC CSCH DAYS DECIMAL ERF.PRECISE ERFC.PRECISE EXPON.DIST F.DIST F.DIST.RT F.INV F.INV.RT
  F.TEST FLOOR.MATH FORMULATEXT GAMMA GAMMA.DIST GAMMA.INV GAMMALN.PRECISE GAUSS HYPGEOM.DIST IFNA IFS IMCOSH IMCOT
  IMCSC IMCSCH IMSEC IMSECH IMSINH IMTAN ISFORMULA ISOWEEKNUM LOGNORM.DIST LOGNORM.INV MAXIFS MINIFS NEGBINOM.DIST
  NORM.DIST NORM.INV NORM.S.DIST NORM.S.INV NUMBERVALUE PDURATION PHI POISSON.DIST RRI SEC SECH SHEET SHEETS SKEW.P
  STDEV.P STDEV.S SWITCH T.DIST T.DIST.2T T.DIST.RT T.INV T.INV.2T T.TEST TEXTJOIN UNICHAR UNICODE VAR.P VAR.S
  WEIBULL.DIST XLOOKUP XOR Z.TEST`.split(/\s+/),
)

const token = /"(?:[^"]|"")*"|'(?:[^']|'')*'|([A-Za-z][A-Za-z0-9.]*)(?=\s*\()/g

/** A formula as a file holds it, without its `=`. Texts and quoted sheet names in it stay as they are. */
export function fileFormula(input: string): string {
  return fileText(input.slice(1)).replace(token, (found, name: string | undefined) =>
    name !== undefined && prefixed.has(name.toUpperCase()) ? `${prefix}${found}` : found,
  )
}
