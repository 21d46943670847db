import type { Metadata } from 'next'
import { headers } from 'next/headers'
import { redirect } from 'next/navigation'
import { safeNext } from '@/app/_server/safe-next'
import { requireActor } from '@/app/_server/session'
import { Brand } from '@/app/_ui/mark'
import { Elevation } from './elevation'
import { SignInForm } from './form'

export const metadata: Metadata = { title: 'Sign in' }

export default async function SignInPage({
  searchParams,
}: {
  readonly searchParams: Promise<{ readonly next?: string | string[] }>
}) {
  const next = safeNext((await searchParams).next)
  if ((await requireActor({ headers: await headers() })).ok) redirect(next)
  return (
    <div className="grid min-h-dvh lg:grid-cols-[minmax(0,1fr)_minmax(0,1.1fr)]">
      <main className="grid content-center justify-items-center px-6 py-12">
        <div className="grid w-full max-w-sm gap-8">
          <Brand />
          <div className="grid gap-1.5">
            <h1 className="text-2xl font-semibold">Sign in</h1>
            <p className="text-quiet">Estimates, take-offs and prices for greenhouse coverings.</p>
          </div>
          <SignInForm next={next} />
          <p className="text-sm text-quiet">No password, or a lost one? Ask your firm's owner.</p>
        </div>
      </main>
      <div className="hidden content-center border-l border-line bg-raised px-16 text-ink lg:grid">
        <Elevation />
      </div>
    </div>
  )
}
