import { classNames } from '#web/lib/class-names.ts'

/** The flag of a stake, survey pink: go here next. */
export function StakeFlag({ label, className }: { label: string; className?: string }) {
  return (
    <span
      className={classNames(
        'num inline-block h-5 w-11 bg-stake pr-[6px] text-center text-[12px] leading-[21px] font-bold text-white [clip-path:polygon(0_0,100%_0,84%_50%,100%_100%,0_100%)]',
        className,
      )}
    >
      {label}
    </span>
  )
}

/** The stake as it stands on a drawing, its foot at x, y. */
export function StakePin({ label, x, y }: { label: string; x: number; y: number }) {
  return (
    <g transform={`translate(${x} ${y})`}>
      <path d="M0 0v-25" stroke="#fff" strokeWidth={5} strokeLinecap="round" />
      <path d="M0 0v-25" stroke="var(--stake)" strokeWidth={2.4} strokeLinecap="round" />
      <path d="M0 -26h27l-5 7.5l5 7.5h-27z" fill="var(--stake)" stroke="#fff" strokeWidth={1.2} />
      <text x={4} y={-14.6} fill="#fff" fontSize={11} fontWeight={700} fontFamily="var(--font-mono)">
        {label}
      </text>
      <circle r={2.8} fill="var(--stake)" stroke="#fff" />
    </g>
  )
}
