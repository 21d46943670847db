import { useEffect, useState } from 'react'
import type { CheckBook } from './checks'

let asked: Promise<CheckBook> | undefined

/** The declarations are large, so they come after the first paint, once for the page. */
export function loadCheckBook(): Promise<CheckBook> {
  asked ??= import('@/lib/estimate').then(({ inOrder, templateChecks }) => ({
    inOrder,
    checks: new Map(templateChecks.map(({ name, about, severity }) => [name, { about, severity }])),
  }))
  asked.catch(() => {
    asked = undefined
  })
  return asked
}

/** What is known of the workbook's checks; undefined until it has arrived. */
export function useCheckBook(): CheckBook | undefined {
  const [book, setBook] = useState<CheckBook | undefined>(undefined)
  useEffect(() => {
    let gone = false
    const timer = setTimeout(() => {
      loadCheckBook().then(
        (loaded) => gone || setBook(loaded),
        () => undefined,
      )
    }, 800)
    return () => {
      gone = true
      clearTimeout(timer)
    }
  }, [])
  return book
}
