import { Link } from 'react-router-dom'
import type { Board } from '#shared/schemas/ground.ts'
import type { Stake } from '#shared/schemas/lot.ts'
import { paths } from '#web/app/paths.ts'
import { PanelRow, PanelRows } from '#web/components/ui/panel-row.tsx'
import { StakeFlag } from '#web/components/ui/stake-flag.tsx'
import { StateSwatch } from '#web/components/ui/state-swatch.tsx'
import { useSite } from '#web/lib/site-context.tsx'

function RecordLink({ to, of }: { to: string; of: string }) {
  return (
    <Link to={to} aria-label={`Record ${of}`} className="inline-flex items-start pointer-coarse:min-h-11">
      Record
    </Link>
  )
}

/** The stakes that stand, and the results that want a re-run. */
export function GoHereNext({ stakes, doubtful, owed }: { stakes: readonly Stake[]; doubtful: Board['doubtful']; owed: number }) {
  const { site, label, zone, units, can } = useSite()
  const records = can('test.record-qc')
  return (
    <section aria-label="Go here next" className="max-h-[372px] overflow-y-auto px-4 py-[22px] sm:px-[26px]">
      <h2 className="m-0 text-[19px] leading-[1.2] font-bold">Go here next</h2>
      {stakes.length === 0 && doubtful.length === 0 ? (
        <p className="mt-3 text-ink-2">{owed > 0 ? `${owed} ${owed === 1 ? 'test is' : 'tests are'} owed and no stake stands. Draw stakes at the lots below.` : 'No test is owed, and no result wants a re-run.'}</p>
      ) : (
        <PanelRows label="Places to test next">
          {stakes.map((stake) => (
            <PanelRow
              key={stake.id}
              mark={<StakeFlag label={stake.label} />}
              title={`Cell ${label(stake.cell)}, ${zone(stake.zoneId)?.shortName ?? ''} lift ${stake.lift}`}
              detail={`E ${units.number(stake.easting, 1)} N ${units.number(stake.northing, 1)}, drawn ${units.date(stake.drawnAt)}`}
              action={records && <RecordLink to={`${paths.newTest(site.id)}?stake=${stake.id}`} of={`the test at ${stake.label}`} />}
            />
          ))}
          {doubtful.map((test) => (
            <PanelRow
              key={test.testId}
              mark={
                <span className="block w-11">
                  <StateSwatch state="suspect" label="Suspect" />
                </span>
              }
              title={`Run ${test.number} again, cell ${label(test.cell)}`}
              detail={test.headline}
              action={records && <RecordLink to={`${paths.newTest(site.id)}?follows=${test.testId}&kind=rerun`} of={`the re-run of ${test.number}`} />}
            />
          ))}
        </PanelRows>
      )}
    </section>
  )
}
