/** Character classes of formula text, by UTF-16 code. `NaN` (past the end) is in none of them. */

export function isDigit(code: number): boolean {
  return code >= 48 && code <= 57
}

export function isLetter(code: number): boolean {
  const lower = code | 32
  return lower >= 97 && lower <= 122
}

export function isWordStart(code: number): boolean {
  return isLetter(code) || code === 95 || (code >= 0xc0 && code <= 0x2af)
}

export function isWordPart(code: number): boolean {
  return isWordStart(code) || isDigit(code)
}

export function isSpace(code: number): boolean {
  return code === 32 || code === 9 || code === 10 || code === 13
}
