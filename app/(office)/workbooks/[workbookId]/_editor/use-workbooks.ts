import { useEffect, useState } from 'react'
import { ask } from '@/app/_ui/request'
import type { CommandContext } from '@/lib/commands'
import { changedWords } from '../../_list/words'

type Listed = CommandContext['workbooks']
interface ListedWorkbook {
  readonly id: string
  readonly title: string
  /** ISO 8601. */
  readonly changed: string
}

/** The firm's other workbooks, asked for when the palette is opened. */
export function useWorkbooks(open: string, wanted: boolean): Listed {
  const [listed, setListed] = useState<Listed>([])
  useEffect(() => {
    if (!wanted) return
    let gone = false
    void ask<readonly ListedWorkbook[]>('GET', '/api/workbooks').then((answer) => {
      if (!gone && answer.ok) setListed(answer.value.filter(({ id }) => id !== open).map(toListed))
    })
    return () => {
      gone = true
    }
  }, [open, wanted])
  return listed
}

function toListed({ id, title, changed }: ListedWorkbook): Listed[number] {
  return { id, title, changed: changedWords(new Date(changed), new Date()) }
}
