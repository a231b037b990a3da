import { useMemo, useRef, useState } from 'react'
import type { Site } from '#app/domain/site/site.ts'
import type { Kept } from '#app/editor/keeping.ts'
import { keptAt } from '#app/editor/kept-at.ts'
import type { ChangeSite } from '#app/editor/site-change.ts'

const siteParsing = async () => (await import('#app/editor/parse-kept.ts')).siteParsing

/** The site at a URL of the API, and the way to change it at once; a stale change shows the server's copy instead. */
export function useSiteChange(url: string, loaded: Kept<Site>): [Site, ChangeSite] {
  const [shown, setShown] = useState(loaded.body)
  const newest = useRef(loaded)
  const keeping = useMemo(() => keptAt({ url, parsing: siteParsing }), [url])
  const show = (kept: Kept<Site>) => {
    newest.current = kept
    setShown(kept.body)
  }
  const change: ChangeSite = async (changed) => {
    const { revision, body: before } = newest.current
    const body = changed(before)
    const answer = await keeping.save({ revision, body, saveId: keeping.newSaveId() })
    if (answer.kind === 'saved') show({ revision: answer.revision, body })
    if (answer.kind !== 'conflict') return answer
    show(answer.current)
    return { kind: 'changed elsewhere', by: answer.by }
  }
  return [shown, change]
}
