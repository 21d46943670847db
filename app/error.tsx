'use client'

import Link from 'next/link'
import { Button, buttonClass } from './_ui/button'
import { Notice } from './_ui/notice'

/** Says nothing of the inside; the digest is the reference under which the server logged it. */
export default function ErrorPage({
  error,
  reset,
}: {
  readonly error: Error & { readonly digest?: string }
  readonly reset: () => void
}) {
  return (
    <Notice
      title="This page could not be shown"
      actions={
        <>
          <Button tone="action" onClick={reset}>
            Try again
          </Button>
          <Link href="/workbooks" className={buttonClass()}>
            Go to the workbooks
          </Link>
        </>
      }
    >
      <p>Something went wrong on our side. What was saved is still saved.</p>
      {error.digest ? (
        <p>
          If it happens again, give your account's owner this reference:{' '}
          <code className="figure text-ink">{error.digest}</code>
        </p>
      ) : null}
    </Notice>
  )
}
