import { Link } from 'react-router-dom'
import type { RejudgeAnswer } from '#shared/schemas/rejudge.ts'
import { paths } from '#web/app/paths.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import { countOf, moveLines, orderLines, releaseLines } from './rejudge-words.ts'

/** What judging again does to ground, releases and orders; `done`: what it did. */
export function RejudgeEffects({ answer, done = false }: { answer: RejudgeAnswer; done?: boolean }) {
  const orders = orderLines(answer.tests, done)
  const releases = releaseLines(answer.releases)
  if (answer.moves.length === 0 && releases.length === 0 && orders.length === 0) {
    return <p className="m-0">The ground {done ? 'stands' : 'would stand'} as it is: no cell, release or order changes.</p>
  }
  return (
    <ul aria-label={done ? 'What it did' : 'What it would do'} className="m-0 list-none p-0">
      {moveLines(answer.moves).map(({ to, words }) => (
        <li key={words} className="flex items-center gap-3 border-b border-rule py-[7px]">
          <StateSwatch state={to} />
          <span>{words}</span>
        </li>
      ))}
      {[...releases, ...orders].map((line) => (
        <li key={line} className="border-b border-rule py-[7px]">
          {line}
        </li>
      ))}
    </ul>
  )
}

/** What was just done, over the table. */
export function RejudgeDone({ answer, by }: { answer: RejudgeAnswer; by: string }) {
  const { site } = useSite()
  const order = answer.tests.find((test) => test.effect.order === 'issue' && test.orderId !== null)
  return (
    <div className="mb-6 max-w-[760px]">
      <Banner title={`${countOf(answer.tests.length, 'test')} judged again by ${by}.`} action={order?.orderId ? <Link to={paths.reworkOrder(site.id, order.orderId)}>Open {order.orderNumber}</Link> : undefined}>
        Both verdicts stand on each test’s sheet.
      </Banner>
      <div className="mt-2">
        <RejudgeEffects answer={answer} done />
      </div>
    </div>
  )
}
