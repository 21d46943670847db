/**
 * Kinds of quantity, their units, and how numbers of them are read and printed.
 * N1 Factors are those of NIST SP 811, exact.
 * N2 Feet and inches read as on a tape; what reads in two ways is refused.
 * N3 A number without a unit is in the workbook's unit; any unit of the kind may be typed.
 * N4 A refusal says what was expected.
 * N5 Lengths print to the sixteenth or the millimetre, money by its currency; no negative zero, nothing for what is not finite.
 * N6 The editor's text is the number, exactly.
 * N7 Number format codes show the unit and leave the number alone.
 * N8 Converting there and back, printing and reading back, change nothing.
 */
export * from './convert'
export { formatDate, parseDate } from './dates'
export { editText } from './edit-text'
export { expectationOf, kindWords } from './expectations'
export { type FormatOptions, formatQuantity } from './format'
export { currencyDigits, currencySign, moneyFormat } from './money'
export { numberFormat } from './number-format'
export { type ParseOptions, parseQuantity, parseValue } from './parse'
export * from './quantities'
