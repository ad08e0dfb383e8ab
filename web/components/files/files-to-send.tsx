import type { AttachmentQuery } from '#shared/schemas/attachment.ts'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { uploads, useUploads } from '#web/data/attachment/uploads.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { PHOTO_TYPES, PickFiles } from './add-files.tsx'
import { UploadRows } from './upload-rows.tsx'

/** Photos of a record that is not saved yet: chosen here, sent once it is. */
export function FilesToSend({ of }: { of: AttachmentQuery }) {
  const { site } = useSite()
  const pending = useUploads(of)
  return (
    <section className="mt-[22px]">
      <SectionHead aside="may be left out">Photos</SectionHead>
      <UploadRows list={pending} label="Photos to send" />
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <PickFiles label="Add photo" accept={PHOTO_TYPES} onPick={(files) => uploads.choose(site.id, of, files)} />
        {pending.length > 0 && <p className="m-0 text-small text-ink-2">Sent when the test is saved. Keep this page open until then.</p>}
      </div>
    </section>
  )
}
