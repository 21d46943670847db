const suspect = /[_\p{Cc}\p{Cs}\ufffe\uffff]/u
const longest = 32_767

/**
 * Text as a file can hold it: no control characters but tab and line feed, no half surrogates, and a literal `_x0041_`
 * escaped, since readers take it for a character code.
 */
export function fileText(text: string): string {
  if (!suspect.test(text)) return text.slice(0, longest)
  return text
    .replace(/\r\n?/g, '\n')
    .replace(/(?![\t\n])\p{Cc}|[\ufffe\uffff]/gu, '')
    .replace(/\p{Cs}/gu, '\ufffd')
    .slice(0, longest)
    .replace(/_(?=x[0-9A-Fa-f]{4}_)/g, '_x005F_')
}

/** What a text cell says: the mark that keeps it from being a formula is not part of it. */
export function textOfInput(input: string): string {
  return input.startsWith("'") ? input.slice(1) : input
}

/** A text that a spreadsheet program would take for a formula if it were typed in again. */
export function looksLikeFormula(text: string): boolean {
  return /^[=+\-@]/.test(text)
}
