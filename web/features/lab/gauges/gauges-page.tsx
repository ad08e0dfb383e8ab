import { LabFrame } from '#web/features/lab/lab-frame.tsx'

export function GaugesPage() {
  return <LabFrame>{null}</LabFrame>
}
