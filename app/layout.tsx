import type { Metadata, Viewport } from 'next'
import { cookies } from 'next/headers'
import type { ReactNode } from 'react'
import '@fontsource-variable/spline-sans/wght.css'
import '@fontsource-variable/spline-sans-mono/wght.css'
import { themeCookie, themeOf } from './_ui/theme'
import { Toasts } from './_ui/toasts'
import './globals.css'

export const metadata: Metadata = {
  title: { default: 'Panewright', template: '%s · Panewright' },
  description: 'The estimating workbook for greenhouse coverings.',
}

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#f7f4ee' },
    { media: '(prefers-color-scheme: dark)', color: '#161d22' },
  ],
}

export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  const theme = themeOf((await cookies()).get(themeCookie)?.value)
  return (
    // The theme may be switched before React takes over the document.
    <html lang="en" data-theme={theme === 'system' ? undefined : theme} suppressHydrationWarning>
      <body>
        {children}
        <Toasts />
        {/* The grid mounts its cell editor here, above everything else. */}
        <div id="portal" className="fixed top-0 left-0 z-50" />
      </body>
    </html>
  )
}
