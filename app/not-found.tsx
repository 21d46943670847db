import type { Metadata } from 'next'
import Link from 'next/link'
import { buttonClass } from './_ui/button'
import { Notice } from './_ui/notice'

export const metadata: Metadata = { title: 'Not found' }

export default function NotFound() {
  return (
    <Notice
      title="There is nothing at this address"
      actions={
        <Link href="/workbooks" className={buttonClass('action')}>
          Go to the workbooks
        </Link>
      }
    >
      <p>The address may be mistyped, or the workbook has been removed, or it is not your firm's.</p>
    </Notice>
  )
}
