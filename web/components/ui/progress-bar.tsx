type ProgressBarProps = {
  /** What is being done: "Building the close-out package". */
  label: string
  done: number
  total: number
  /** What is counted: "tests". */
  of: string
}

const count = new Intl.NumberFormat('en-US')

/** Progress on long work, in words and as a bar. */
export function ProgressBar({ label, done, total, of }: ProgressBarProps) {
  const share = total > 0 ? Math.min(100, Math.max(0, (done / total) * 100)) : 0
  const words = `${label}, ${count.format(done)} of ${count.format(total)} ${of}`
  return (
    <div
      role="progressbar"
      aria-label={label}
      aria-valuemin={0}
      aria-valuemax={total}
      aria-valuenow={done}
      aria-valuetext={words}
      className="relative min-h-[22px] border border-ink bg-raised text-[12px] leading-[20px] font-semibold"
    >
      <span className="block px-[10px]">{words}</span>
      <span aria-hidden className="absolute inset-0 bg-meets-spec px-[10px] text-[#14212a]" style={{ clipPath: `inset(0 ${100 - share}% 0 0)` }}>
        {words}
      </span>
    </div>
  )
}
