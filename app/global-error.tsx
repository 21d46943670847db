'use client'

import ErrorPage from './error'
import './globals.css'

/** Stands in for the whole document when the root layout itself fails. */
export default function GlobalError(props: {
  readonly error: Error & { readonly digest?: string }
  readonly reset: () => void
}) {
  return (
    <html lang="en">
      <body>
        <title>Panewright</title>
        <ErrorPage {...props} />
      </body>
    </html>
  )
}
