import { useState, type ReactNode } from 'react'
import { Form, Link } from 'react-router'
import { IconButton } from '#app/components/button.tsx'
import { TabNav } from '#app/components/tabs.tsx'
import { Wordmark } from '#app/components/wordmark.tsx'

/** Who looks at the page. */
export interface Viewer {
  readonly name: string
  readonly organisationName: string
  readonly role: string
}

const sections = [
  { to: '/jobs', label: 'Jobs' },
  { to: '/heaters', label: 'Heaters' },
  { to: '/rules', label: 'Rules' },
  { to: '/team', label: 'Team' },
]

interface PageFrameProps {
  viewer: Viewer
  /** At the right of the top bar: a search, the primary. */
  tools?: ReactNode
  children: ReactNode
}

/** A page of the top level: the bar with Jobs, Heaters, Rules and Team, then the page on paper. */
export function PageFrame({ viewer, tools, children }: PageFrameProps) {
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      <header className="flex flex-wrap items-center gap-x-3.5 border-b border-rule bg-paper-raised px-4 tablet:h-13 tablet:flex-nowrap">
        <Link to="/jobs" className="flex h-13 flex-none items-center">
          <Wordmark />
        </Link>
        <div className="order-last -ml-3 h-11 w-full overflow-x-auto tablet:order-none tablet:ml-3 tablet:h-13 tablet:w-auto print:hidden">
          <TabNav label="Inglefield" tabs={sections} />
        </div>
        <span className="flex-1" />
        <span className="contents print:hidden">{tools}</span>
        <ViewerMenu viewer={viewer} />
      </header>
      <main id="main" className="flex-1 px-4 pt-4 pb-12 tablet:px-8">
        {children}
      </main>
    </div>
  )
}

interface JobFrameProps {
  viewer: Viewer
  job: { readonly id: string; readonly name: string }
  /** Which of the job's pages is open. */
  current: 'brief' | 'site' | 'variants' | 'compare'
  /** At the right of the bar: save state, undo, the primary. */
  tools?: ReactNode
  /** A second row of the bar, across the page: the variants to switch between. */
  below?: ReactNode
  /** Work pages take the whole width and bring their own margins. */
  bare?: boolean
  children: ReactNode
}

/** A page of one job: the way back to all jobs, its name, and Brief · Site · Variants · Compare. */
export function JobFrame({ viewer, job, current, tools, below, bare = false, children }: JobFrameProps) {
  const base = `/jobs/${job.id}`
  const tabs = [
    { to: `${base}/brief`, label: 'Brief', here: current === 'brief' },
    { to: `${base}/site`, label: 'Site', here: current === 'site' },
    { to: `${base}/variants`, label: 'Variants', here: current === 'variants' },
    { to: `${base}/compare`, label: 'Compare', here: current === 'compare' },
  ]
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      <header className="flex flex-wrap items-center gap-x-3.5 border-b border-rule bg-paper-raised px-4 wide-tablet:h-13 wide-tablet:flex-nowrap">
        <nav
          aria-label="Where this is"
          className="flex h-13 min-w-24 flex-1 items-center gap-2 text-ink-3 wide-tablet:min-w-0 wide-tablet:flex-initial"
        >
          <Link to="/jobs" aria-label="Inglefield, all jobs" className="flex h-full flex-none items-center text-ink">
            <span className="hidden desk:inline">
              <Wordmark />
            </span>
            <span className="desk:hidden">
              <Wordmark text="sr-only" />
            </span>
          </Link>
          <span aria-hidden="true" className="text-rule-strong">
            /
          </span>
          <Link to="/jobs" className="hidden flex-none hover:text-ink tablet:inline pointer-coarse:py-3">
            Jobs
          </Link>
          <span aria-hidden="true" className="hidden text-rule-strong tablet:inline">
            /
          </span>
          <Link to={base} className="truncate font-medium text-ink pointer-coarse:py-3">
            {job.name}
          </Link>
        </nav>
        <div className="order-last -ml-3 h-11 w-full overflow-x-auto wide-tablet:order-none wide-tablet:ml-0 wide-tablet:h-13 wide-tablet:w-auto print:hidden">
          <TabNav label={`Pages of ${job.name}`} tabs={tabs} />
        </div>
        <span className="hidden flex-1 wide-tablet:inline" />
        <span className="contents print:hidden">{tools}</span>
        <ViewerMenu viewer={viewer} />
      </header>
      {below}
      <main id="main" className={bare ? 'flex min-h-0 flex-1 flex-col' : 'flex-1 px-4 pt-4 pb-12 tablet:px-5'}>
        {children}
      </main>
    </div>
  )
}

function SkipLink() {
  return (
    <a
      href="#main"
      className="sr-only z-50 rounded-md bg-ink px-3 py-2 text-paper-raised focus:not-sr-only focus:absolute focus:top-2 focus:left-2"
    >
      To the page
    </a>
  )
}

function ViewerMenu({ viewer }: { viewer: Viewer }) {
  return (
    <details className="relative flex-none print:hidden">
      <summary className="flex h-8 cursor-pointer list-none items-center rounded-md px-2 text-ink-2 hover:bg-paper-sunk hover:text-ink pointer-coarse:h-11 [&::-webkit-details-marker]:hidden">
        <span className="hidden desk:inline">{viewer.organisationName}</span>
        <span className="desk:hidden">{initials(viewer.name)}</span>
      </summary>
      <div className="absolute right-0 z-40 mt-1 w-64 rounded-md border border-rule bg-paper-raised p-3 shadow-lift">
        <p className="font-medium">{viewer.name}</p>
        <p className="text-xs text-ink-2">
          {viewer.role}, {viewer.organisationName}
        </p>
        <div className="mt-3 flex items-center justify-between border-t border-rule pt-2">
          <ChromeSwitch />
          <Form method="post" action="/sign-out">
            <button type="submit" className="min-h-8 px-2 text-ink-2 underline hover:text-ink pointer-coarse:min-h-11">
              Sign out
            </button>
          </Form>
        </div>
      </div>
    </details>
  )
}

const initials = (name: string) =>
  name
    .split(/\s+/)
    .slice(0, 2)
    .map((word) => word.charAt(0).toUpperCase())
    .join('')

const yearInSeconds = 31_536_000

/** Light or dark paper around the drawing; kept in a cookie so that the server draws the right one. */
function ChromeSwitch() {
  const [chrome, setChrome] = useState<'light' | 'dark' | null>(null)
  const swap = () => {
    const root = document.documentElement
    const system = matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light'
    const now = root.dataset['chrome'] === 'system' ? system : root.dataset['chrome']
    const next = now === 'dark' ? 'light' : 'dark'
    root.dataset['chrome'] = next
    document.cookie = `chrome=${next}; path=/; max-age=${yearInSeconds}; samesite=lax`
    setChrome(next)
  }
  return (
    <IconButton icon={chrome === 'dark' ? 'sun' : 'moon'} label="Switch between light and dark paper" onClick={swap} />
  )
}
