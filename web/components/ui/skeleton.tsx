/** The lines of a sheet that is still on its way, each a share of the width. */
export function Skeleton({ label, lines = [70, 92, 48] }: { label: string; lines?: readonly number[] }) {
  return (
    <div role="status" aria-label={label}>
      {lines.map((share, index) => (
        <span key={index} aria-hidden className="dashes mb-[10px] block h-[14px]" style={{ width: `${share}%` }} />
      ))}
    </div>
  )
}
