export { writeXlsx, type XlsxOptions } from './write-xlsx'
export type { XlsxStream } from './writer'
