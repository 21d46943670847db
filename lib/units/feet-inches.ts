import { takeNumber } from './number-text'

/**
 * Feet and inches as tapes and drawings write them: `12' 6 1/2"`, `12'-6 1/2"`, `12 ft 6 in`, `47 7/8"`, `3.5'`,
 * and, where `bare` allows it, `12-6 1/2`. Anything with a foot or inch mark that reads in two ways is refused.
 */
export type FeetInches =
  | { readonly kind: 'other' } // not in this notation
  | { readonly kind: 'refused'; readonly why: string }
  | {
      readonly kind: 'read'
      readonly unit: 'in' | 'ft'
      readonly value: number
      readonly decimalComma: boolean
    }

const refused = (why: string): FeetInches => ({ kind: 'refused', why })
const other: FeetInches = { kind: 'other' }

/** `text` is plain (`plainText`) and without a sign. `bare` is the unit of a plain number there, if feet-inches may be bare. */
export function readFeetInches(text: string, bare: 'ft' | 'in' | undefined): FeetInches {
  const words = /^([\d.,]+) ?(?:feet|foot|ft)\.?[ -]*(\d.*?) ?(?:inches|inch|in)\.?$/i.exec(text)
  const marked = words ? `${words[1]}' ${words[2]}"` : text
  const feetEnd = marked.indexOf("'")
  if (feetEnd >= 0) return withFeet(marked.slice(0, feetEnd).trim(), marked.slice(feetEnd + 1).trim())
  if (marked.endsWith('"')) return inchesOnly(marked.slice(0, -1).trim())
  return bare ? withoutMarks(marked, bare) : other
}

function withFeet(feetText: string, after: string): FeetInches {
  const feet = takeNumber(feetText)
  if (feet?.rest !== '') return refused(`“${feetText}'” is not a number of feet`)
  if (feet.fraction) {
    return refused(`“${feetText}'” could be feet or inches: write 6' 3/5" or 6.6'`)
  }
  if (after === '') return { kind: 'read', unit: 'ft', value: feet.value, decimalComma: feet.decimalComma }
  return joined(feet.value, after.replace(/^-\s*/, '').replace(/\s*"$/, ''))
}

/** `inchText` is what stands between the foot mark and the closing mark. */
function joined(feet: number, inchText: string): FeetInches {
  const inches = takeNumber(inchText)
  if (inches?.rest !== '') {
    return refused(inchText === '' ? 'the inches are missing' : `“${inchText}” is not a number of inches`)
  }
  if (!Number.isInteger(feet)) return refused('feet beside inches are whole')
  if (inches.value >= 12) return refused('inches beside feet stay below 12')
  return {
    kind: 'read',
    unit: 'in',
    value: feet * 12 + inches.value,
    decimalComma: inches.decimalComma,
  }
}

function inchesOnly(text: string): FeetInches {
  const inches = takeNumber(text)
  if (inches && inches.rest === '') {
    return { kind: 'read', unit: 'in', value: inches.value, decimalComma: inches.decimalComma }
  }
  const dashed = /^(\d+)-(.+)$/.exec(text)
  return dashed?.[1] !== undefined && dashed[2] !== undefined
    ? joined(Number(dashed[1]), dashed[2])
    : refused(`“${text}"” is not a number of inches`)
}

function withoutMarks(text: string, bare: 'ft' | 'in'): FeetInches {
  const dashed = /^(\d+)-(\d.*)$/.exec(text)
  if (dashed?.[1] === undefined || dashed[2] === undefined) return other
  const fractionAlone = /^\d+\/\d+$/.test(dashed[2])
  if (!fractionAlone) return /^[\d\s./]+$/.test(dashed[2]) ? joined(Number(dashed[1]), dashed[2]) : other
  if (bare === 'in') return other // 11-15/16 among inches is a mixed number
  return refused(
    `“${text}” could be feet or inches: write ${dashed[1]}' ${dashed[2]}" or ${dashed[1]} ${dashed[2]}"`,
  )
}
