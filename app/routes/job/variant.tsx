import { useMemo } from 'react'
import { useNavigate, type ShouldRevalidateFunctionArgs } from 'react-router'
import useSWR from 'swr'
import { can } from '#app/domain/access/roles.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { useToast } from '#app/components/toast.tsx'
import type { Kept } from '#app/editor/keeping.ts'
import { keptAt } from '#app/editor/kept-at.ts'
import { useSiteChange } from '#app/editor/use-site-change.ts'
import { VariantEditor } from '#app/editor/variant-editor.tsx'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { requireLaidOut } from '#app/server/data/laid-out.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/variant'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `${loaderData?.variant.title ?? 'Variant'}, ${loaderData?.job.name ?? 'job'} · Inglefield` },
]

export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const { variant, site, siteRevision, brief, models, house, ofJob } = await requireLaidOut(job, params.variantId)
  return {
    viewer: viewerOf(job.member),
    job: { id: job.id, name: job.name },
    variant: { id: variant.id, title: variant.title, revision: variant.revision, heaters: variant.heaters },
    variants: ofJob.map(({ id, number, title }) => ({ id, number, title, href: `/jobs/${job.id}/variants/${id}` })),
    kept: { revision: siteRevision, body: site },
    brief,
    catalogue: [...models.values()],
    house,
    readOnly: !can(job.member.role, 'edit-layout'),
    mayExport: can(job.member.role, 'export'),
  }
}

/** The page saves by itself: only another variant is loaded anew. */
export const shouldRevalidate = ({ currentParams, nextParams }: ShouldRevalidateFunctionArgs): boolean =>
  currentParams['variantId'] !== nextParams['variantId']

export default function VariantPage({ loaderData }: Route.ComponentProps) {
  return <KeptVariant key={loaderData.variant.id} {...loaderData} />
}

const parsing = () => import('#app/editor/parse-kept.ts')

const variantParsing = async () => (await parsing()).variantParsing

async function findKept(url: string): Promise<Kept<Layout>> {
  const response = await fetch(url)
  if (!response.ok) throw new Error(`${response.status}`)
  return (await variantParsing()).kept(await response.json())
}

function KeptVariant({
  variant,
  variants,
  job,
  mayExport,
  kept: keptSite,
  ...rest
}: Route.ComponentProps['loaderData']) {
  const navigate = useNavigate()
  const toast = useToast()
  const url = `/api/variants/${variant.id}`
  const initial = useMemo(() => {
    const { revision, title, heaters } = variant
    return { revision, body: { title, heaters } }
  }, [variant])
  const { data: newest = initial, mutate } = useSWR(url, findKept, {
    fallbackData: initial,
    revalidateOnMount: false,
    revalidateIfStale: false,
  })
  const keeping = useMemo(() => {
    const onSaved = async (saved: Kept<Layout>) => void (await mutate(saved, { revalidate: false }))
    return keptAt({ url, parsing: variantParsing, onSaved })
  }, [url, mutate])
  const [site, changeSite] = useSiteChange(`/api/jobs/${job.id}/site`, keptSite)
  const make = async (body: object) => {
    const made = await send('POST', `/api/jobs/${job.id}/variants`, body)
    if (!made) toast({ text: 'No variant made: no connection. Nothing was lost.' })
    return made ? (await parsing()).variantId(made) : null
  }
  const open = (id: string) => navigate(`/jobs/${job.id}/variants/${id}`)
  const makeAndOpen = async (body: object) => {
    const made = await make(body)
    if (made) await open(made)
  }
  const remove = async (revision: number) => {
    const next = variants.find(({ id }) => id !== variant.id)
    const gone = next && (await send('DELETE', url, null, { 'If-Match': `"${revision}"` }))
    if (!next || !gone) return toast({ text: 'Not deleted: it was changed meanwhile, or there is no connection.' })
    await open(next.id)
    const undo = async () => {
      if (await send('POST', `${url}/restore`, { deleted: true })) await open(variant.id)
    }
    toast({ text: `Variant “${newest.body.title}” deleted`, action: { label: 'Undo', run: () => void undo() } })
  }
  return (
    <VariantEditor
      {...rest}
      {...{ job, variants, initial, newest, keeping, site }}
      onSite={changeSite}
      variantId={variant.id}
      sizesHref={`/jobs/${job.id}/variants/${variant.id}/sizes`}
      pictureHref={mayExport ? `/jobs/${job.id}/variants/${variant.id}/picture` : null}
      hangHref={`/jobs/${job.id}/variants/${variant.id}/hang`}
      onCreate={() => void makeAndOpen({ title: 'New layout' })}
      onDuplicate={() => void makeAndOpen({ copyOf: variant.id })}
      onDelete={(revision) => void remove(revision)}
      onMake={async (layout) => (await make(layout)) !== null}
    />
  )
}

/** The answer of the API as it came; null without one that is good. */
async function send(method: string, url: string, body: object | null, headers: Record<string, string> = {}) {
  try {
    const response = await fetch(url, {
      method,
      headers: { 'Content-Type': 'application/json', 'Idempotency-Key': crypto.randomUUID(), ...headers },
      ...(body ? { body: JSON.stringify(body) } : {}),
    })
    if (!response.ok) return null
    const json: unknown = await response.json()
    return json
  } catch {
    return null
  }
}
