import { useId, useState } from 'react'
import { mostMegabytes, mostPhotos } from '#app/domain/photo/photo-limits.ts'
import { Button } from '#app/components/button.tsx'
import { Field, TextField } from '#app/components/field.tsx'
import { usePhotoUploads, type SendPhoto } from '#app/editor/photo/use-photo-uploads.ts'

interface AddPhotosProps {
  /** Photos that the job has already. */
  readonly count: number
  readonly send: SendPhoto
  readonly onDone: () => void
}

/** Photos and pages of drawings for a job: chosen, sent one after the other, refused beside the field. */
export function AddPhotos({ count, send, onDone }: AddPhotosProps) {
  const [chosen, setChosen] = useState<readonly File[]>([])
  const [page, setPage] = useState('1')
  const { underway, problems, start, stop } = usePhotoUploads(send, onDone)
  const problemId = useId()
  const pdf = chosen.some((file) => /\.pdf$/i.test(file.name) || file.type === 'application/pdf')
  const wrongPage = /^[1-9]\d{0,3}$/.test(page.trim()) ? null : 'A page number, from 1.'
  if (count >= mostPhotos) return <p className="text-ink-2">A job has at most {mostPhotos} photos. Remove one first.</p>
  return (
    <section aria-label="Add photos" className="flex flex-wrap items-start gap-x-3 gap-y-2">
      <Field
        label="Photos, or a plan as PDF"
        hint={`JPEG, PNG or WebP, at most ${mostMegabytes} MB each. Where and when it was taken is not kept.`}
        error={problems.length > 0 ? 'Not everything was kept.' : null}
        className="max-w-md flex-1"
      >
        {(control) => (
          <input
            {...control}
            aria-describedby={`${control['aria-describedby'] ?? ''} ${problemId}`}
            type="file"
            multiple
            accept="image/jpeg,image/png,image/webp,application/pdf"
            className="block h-8 w-full rounded-md border border-rule-strong bg-paper-raised pr-2 text-ink-2 file:mr-2.5 file:h-full file:border-0 file:border-r file:border-rule-strong file:bg-paper-sunk file:px-3 file:font-medium file:text-ink pointer-coarse:h-11"
            onChange={(event) => setChosen([...(event.target.files ?? [])])}
          />
        )}
      </Field>
      {pdf && (
        <TextField
          label="Page of the PDF"
          className="w-28"
          inputMode="numeric"
          value={page}
          error={wrongPage}
          onChange={(event) => setPage(event.target.value)}
        />
      )}
      <Button
        className="mt-4"
        disabled={chosen.length === 0 || underway !== null || (pdf && wrongPage !== null)}
        onClick={() => void start(chosen, Number(page))}
      >
        {underway ? `Sending ${underway.at} of ${underway.of}` : 'Add'}
      </Button>
      {underway && (
        <Button kind="text" className="mt-4" onClick={stop}>
          Cancel
        </Button>
      )}
      <ul id={problemId} role="status" className="w-full text-xs text-clay">
        {problems.map(({ name, reason }) => (
          <li key={name}>
            {name}: {reason}
          </li>
        ))}
      </ul>
    </section>
  )
}
