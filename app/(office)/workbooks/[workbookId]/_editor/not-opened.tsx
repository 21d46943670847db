import Link from 'next/link'
import { Button, buttonClass } from '@/app/_ui/button'
import { Notice } from '@/app/_ui/notice'
import type { Failure } from '@/lib/failures'

/** Why the workbook did not open, and what can be done about it. */
export function NotOpened({
  failure,
  id,
  again,
}: {
  readonly failure: Failure
  readonly id: string
  readonly again: () => void
}) {
  const signedOut = failure.code === 'unauthenticated'
  const absent = failure.code === 'not-found'
  return (
    <Notice
      title={
        signedOut ? 'You are signed out' : absent ? 'There is no such workbook' : 'The workbook did not open'
      }
      actions={
        <>
          {signedOut ? (
            <Link
              className={buttonClass('action')}
              href={`/sign-in?next=${encodeURIComponent(`/workbooks/${id}`)}`}
            >
              Sign in
            </Link>
          ) : absent ? null : (
            <Button tone="action" onClick={again}>
              Try again
            </Button>
          )}
          <Link className={buttonClass()} href="/workbooks">
            All workbooks
          </Link>
        </>
      }
    >
      <p>
        {absent
          ? 'It was removed, or it belongs to another firm.'
          : signedOut
            ? 'Sign in again to go on. Changes that were not saved yet are kept on this device.'
            : failure.text}
      </p>
    </Notice>
  )
}
