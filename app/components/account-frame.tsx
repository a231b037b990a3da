import type { ReactNode } from 'react'
import { Wordmark } from '#app/components/wordmark.tsx'

/** The frame of the pages before signing in: a terrace at dusk at the left where there is room, the form at the right. */
export function AccountFrame({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div className="grid min-h-dvh wide-tablet:grid-cols-[minmax(0,3fr)_minmax(26rem,2fr)]">
      <div className="relative hidden bg-dusk-ground wide-tablet:block">
        <img
          src="/terrace-at-dusk.svg"
          alt=""
          loading="lazy"
          className="absolute inset-0 size-full object-cover object-left"
        />
      </div>
      <main id="main" className="flex flex-col justify-center px-6 py-12 tablet:px-24 wide-tablet:px-12">
        <div className="mx-auto w-full max-w-90 text-sm">
          <Wordmark size={42} text="text-xl" />
          <h1 className="mt-12 mb-4 text-xl font-strong">{title}</h1>
          {children}
        </div>
      </main>
    </div>
  )
}
