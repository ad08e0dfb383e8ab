import { LabFrame } from '#web/features/lab/lab-frame.tsx'

export function OnePointPage() {
  return <LabFrame>{null}</LabFrame>
}
