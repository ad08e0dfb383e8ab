import { useRef, type ChangeEvent } from 'react'
import { Button } from '#web/components/ui/button.tsx'

type PickFilesProps = {
  label: string
  accept: string
  /** straight to the camera, where the device has one */
  camera?: boolean
  onPick: (files: readonly File[]) => void
}

/** A button that opens the device's chooser of files, several at once. */
export function PickFiles({ label, accept, camera = false, onPick }: PickFilesProps) {
  const input = useRef<HTMLInputElement>(null)
  const handleChange = (event: ChangeEvent<HTMLInputElement>): void => {
    const files = Array.from(event.target.files ?? [])
    // the same file again is a choice as well
    event.target.value = ''
    if (files.length > 0) onPick(files)
  }
  return (
    <>
      <Button className="pointer-coarse:min-h-12" onClick={() => input.current?.click()}>
        {label}
      </Button>
      <input ref={input} type="file" hidden aria-label={label} accept={accept} multiple={!camera} {...(camera ? { capture: 'environment' as const } : {})} onChange={handleChange} />
    </>
  )
}

export const PHOTO_TYPES = 'image/*'
export const FILE_TYPES = 'image/*,application/pdf'
