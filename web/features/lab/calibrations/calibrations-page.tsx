import { LabFrame } from '#web/features/lab/lab-frame.tsx'

export function CalibrationsPage() {
  return <LabFrame>{null}</LabFrame>
}
