import './parse-without-eval.ts'
import type { ReactNode } from 'react'
import {
  isRouteErrorResponse,
  Links,
  Meta,
  Outlet,
  Scripts,
  ScrollRestoration,
  useLocation,
  useRouteLoaderData,
} from 'react-router'
import { ToastProvider } from '#app/components/toast.tsx'
import { Wordmark } from '#app/components/wordmark.tsx'
import { buttonClass } from '#app/components/button.tsx'
import { middleware as serverMiddleware } from '#app/server/middleware.server.ts'
import type { Route } from './+types/root'
import './app.css'

/** Before every loader and action: headers, origin, body limits, membership. */
export const middleware: Route.MiddlewareFunction[] = serverMiddleware

export const links: Route.LinksFunction = () => [{ rel: 'icon', href: '/icon.svg', type: 'image/svg+xml' }]

export const meta: Route.MetaFunction = () => [{ title: 'Inglefield' }]

/** Light or dark paper as this browser chose it; `system` when it did not. Holds nothing of an organisation. */
export function loader({ request }: Route.LoaderArgs) {
  const chosen = /(?:^|;\s*)chrome=(light|dark)/.exec(request.headers.get('Cookie') ?? '')
  return { chrome: chosen?.[1] ?? 'system' }
}

/** The paper does not change with the page: the switch sets it in place. */
export const shouldRevalidate = () => false

export function Layout({ children }: { children: ReactNode }) {
  const loaded = useRouteLoaderData<typeof loader>('root')
  return (
    <html lang="en" data-chrome={loaded?.chrome ?? 'system'} suppressHydrationWarning>
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="color-scheme" content="light dark" />
        <Meta />
        <Links />
      </head>
      <body>
        {children}
        <ScrollRestoration />
        <Scripts />
      </body>
    </html>
  )
}

export default function App() {
  return (
    <ToastProvider>
      <Outlet />
    </ToastProvider>
  )
}

/** The one error page: what happened, what is safe, what to do. */
export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  const { pathname } = useLocation()
  const words = wordsFor(error)
  return (
    <main id="main" className="flex min-h-dvh flex-col justify-center gap-4 px-6 py-12 tablet:px-24">
      <Wordmark />
      <title>{`${words.title} · Inglefield`}</title>
      <h1 className="mt-4 text-2xl font-strong">{words.title}</h1>
      <p className="max-w-xl text-base text-ink-2">{words.safe}</p>
      <p className="max-w-xl text-base text-ink-2">{words.way}</p>
      <p className="mt-2 flex flex-wrap gap-3">
        {words.again && (
          <a href={pathname} className={buttonClass('primary', 'large')}>
            Try again
          </a>
        )}
        <a href="/jobs" className={buttonClass(words.again ? 'outline' : 'primary', 'large')}>
          All jobs
        </a>
      </p>
      {import.meta.env.DEV && error instanceof Error && (
        <pre className="mt-6 overflow-auto rounded-md bg-paper-sunk p-4 text-xs">{error.stack}</pre>
      )}
    </main>
  )
}

interface ErrorWords {
  title: string
  safe: string
  way: string
  again: boolean
}

const unavailable: ErrorWords = {
  title: 'The records cannot be reached',
  safe: 'Everything saved before is safe. Changes made on this page since then are kept on this device.',
  way: 'The connection to the records is usually back within a minute.',
  again: true,
}

const byStatus: Record<number, ErrorWords> = {
  403: {
    title: 'Your role does not open this page',
    safe: 'Nothing was changed.',
    way: 'Ask an owner of your organisation if you need it.',
    again: false,
  },
  404: {
    title: 'Nothing at this address',
    safe: 'Nothing was changed or lost.',
    way: 'It may have been removed, or it belongs to another organisation. Start again from the list of jobs.',
    again: false,
  },
  429: {
    title: 'Too many tries',
    safe: 'Nothing was changed.',
    way: 'Wait a quarter of an hour, then try again.',
    again: true,
  },
  503: unavailable,
}

const broken: ErrorWords = {
  title: 'This page could not be made',
  safe: 'Everything saved before is safe. The fault is in the program, not in your work.',
  way: 'Try again. If it stays, tell the people who run Inglefield the address of this page and the time.',
  again: true,
}

const wordsFor = (error: unknown): ErrorWords =>
  isRouteErrorResponse(error) ? (byStatus[error.status] ?? broken) : broken
