import ExcelJS from 'exceljs'
import type { DefinedName } from './addresses'

/** What is needed of a Node.js writable stream. */
export interface XlsxStream {
  readonly destroyed: boolean
  readonly writableFinished: boolean
  once(event: string, listener: (...args: unknown[]) => void): unknown
}

export interface WriterOptions {
  readonly stream: XlsxStream
  readonly title: string
  readonly created: Date
}

/** The parts of exceljs's streaming writer that its types leave out. */
interface Insides {
  readonly zip: { append: (source: unknown, entry: { readonly name: string; date?: Date }) => unknown }
  _definedNames: { readonly model: readonly DefinedName[] }
}

type Target = NonNullable<ConstructorParameters<typeof ExcelJS.stream.xlsx.WorkbookWriter>[0]['stream']>

const program = 'Panewright'

/**
 * exceljs's streaming writer with its gaps closed: entries of the archive bear the given date, so that the same workbook
 * gives the same bytes; names are written as given instead of gathered cell by cell; programs recalculate on opening.
 */
export class XlsxWriter extends ExcelJS.stream.xlsx.WorkbookWriter {
  constructor({ stream, title, created }: WriterOptions) {
    const options = { stream: stream as unknown as Target, created, useStyles: true, useSharedStrings: true }
    super({ ...options, zip: { zlib: { level: 6 } } })
    this.creator = program
    this.lastModifiedBy = program
    this.title = title
  }

  setDefinedNames(names: readonly DefinedName[]): void {
    insidesOf(this)._definedNames = { model: names }
  }

  /** The parent's constructor calls this before it adds any entry. */
  override addThemes(): Promise<void> {
    const { zip } = insidesOf(this)
    const append = zip.append.bind(zip)
    zip.append = (source, entry) =>
      append(typeof source === 'string' ? amended(entry.name, source) : source, {
        ...entry,
        date: this.created,
      })
    return super.addThemes()
  }
}

function amended(entry: string, xml: string): string {
  if (entry.endsWith('workbook.xml')) return xml.replace('<calcPr ', '<calcPr fullCalcOnLoad="1" ')
  return entry.endsWith('app.xml')
    ? xml
        .replace(/<Application>[^<]*/, `<Application>${program}`)
        .replace(/<AppVersion>[^<]*<\/AppVersion>/, '')
    : xml
}

function insidesOf(writer: XlsxWriter): Insides {
  return writer as unknown as Insides
}
