import { generateWorkbook } from './generated-workbook'
import { seededSubject } from './seeded-workbook'
import type { Subject } from './subject'

/** The workbook that a new user gets, or a generated one of so many cells. */
export type SubjectName = 'seeded' | number

export function subjectOf(name: SubjectName): Subject {
  return name === 'seeded' ? seededSubject() : generateWorkbook(name)
}
