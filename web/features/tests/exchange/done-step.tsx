import { Link } from 'react-router-dom'
import { paths } from '#web/app/paths.ts'
import { buttonClasses } from '#web/components/ui/button-classes.ts'
import { Button } from '#web/components/ui/button.tsx'
import { SectionHead } from '#web/components/ui/section-head.tsx'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { useSite } from '#web/lib/site-context.tsx'
import type { Accepted } from './use-accepting.ts'

type DoneStepProps = { accepted: Accepted; already: number; aside: number; onSaveAside: () => void; onFinish: () => void }

/** What became of the file: every line under its new number. */
export function DoneStep({ accepted: { recorded, already: known }, already, aside, onSaveAside, onFinish }: DoneStepProps) {
  const { site } = useSite()
  const before = already + known.length
  return (
    <div className="max-w-[980px] pb-10">
      <SectionHead>{recorded.length === 1 ? 'One test was recorded' : `${recorded.length.toLocaleString('en-US')} tests were recorded`}</SectionHead>
      <p className="m-0 mb-4 text-ink-2">
        {before > 0 && `${before.toLocaleString('en-US')} stood here already and were left as they are. `}
        {aside > 0 && `${aside.toLocaleString('en-US')} were set aside; save them to see to them later. `}
        The numbers of the file are kept with the import in the audit trail.
      </p>
      <div className="mb-5 flex flex-wrap gap-[10px]">
        <Link to={paths.tests(site.id)} className={buttonClasses('primary', 'regular', 'pointer-coarse:min-h-12')}>
          To the results
        </Link>
        {aside > 0 && (
          <Button onClick={onSaveAside} className="pointer-coarse:min-h-12">
            Save what was set aside
          </Button>
        )}
        <Button onClick={onFinish} className="pointer-coarse:min-h-12">
          Import another file
        </Button>
      </div>
      <Table caption="Recorded tests">
        <thead>
          <tr>
            {['Number', 'Line', 'In the file', 'Result', 'Rework order'].map((head) => (
              <HeadCell key={head}>{head}</HeadCell>
            ))}
          </tr>
        </thead>
        <tbody>
          {recorded.map((test) => (
            <Row key={test.id}>
              <RowHead>
                <Link to={paths.test(site.id, test.id)} className="text-ink">
                  {test.number}
                </Link>
              </RowHead>
              <Cell className="num">{test.line}</Cell>
              <Cell>{test.reference}</Cell>
              <Cell>{test.headline}</Cell>
              <Cell>{test.orderNumber ?? ''}</Cell>
            </Row>
          ))}
        </tbody>
      </Table>
    </div>
  )
}
