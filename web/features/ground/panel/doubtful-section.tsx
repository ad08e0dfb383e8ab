import { Link } from 'react-router-dom'
import type { Board } from '#shared/schemas/ground.ts'
import { paths } from '#web/app/paths.ts'
import { PanelRows } from '#web/components/ui/panel-row.tsx'
import { PanelSection } from '#web/components/ui/sheet.tsx'
import { TestMark } from '#web/components/ui/test-mark.tsx'
import { newTestLink } from '#web/features/ground/plan/ground-links.ts'
import { liftWords } from '#web/features/ground/plan/ground-words.ts'
import { useSite } from '#web/lib/site-context.tsx'
import { GroupRow, ShowButton } from './group-row.tsx'

/** Results that can't be right: each is run again before its ground counts. */
export function DoubtfulSection({ board }: { board: Board }) {
  const { site, label, can, zoneOfCell } = useSite()
  if (board.doubtful.length === 0) return null
  return (
    <PanelSection title="Run again">
      <PanelRows label="Results to run again">
        {board.doubtful.map(({ testId, number, cell, lift, headline }) => (
          <GroupRow
            key={testId}
            mark={<TestMark outcome="suspect" decorative />}
            title={headline}
            detail={`${number}, cell ${label(cell)}, ${zoneOfCell(cell)?.name ?? ''} ${liftWords(lift)}`}
            action={<ShowButton cells={board.notYet.find((group) => group.testId === testId)?.cells ?? [cell]} of={`the ground of ${number}`} />}
            acts={
              <>
                <Link to={paths.test(site.id, testId)}>Open {number}</Link>
                {can('test.record-qc') && <Link to={newTestLink(site.id, { follows: testId, kind: 'rerun' })}>Run it again</Link>}
              </>
            }
          />
        ))}
      </PanelRows>
    </PanelSection>
  )
}
