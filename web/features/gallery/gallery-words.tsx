import { useState } from 'react'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { Question, QuestionCancel } from '#web/components/ui/dialog.tsx'
import { FactsRow, Figure } from '#web/components/ui/figure.tsx'
import { Popover } from '#web/components/ui/menu.tsx'
import { Cell, HeadCell, Row, RowHead, Table } from '#web/components/ui/table.tsx'
import { Tabs } from '#web/components/ui/tabs.tsx'
import { GalleryColumn, GalleryPart } from './gallery-part.tsx'

const TESTS = [
  ['T-0219', 'N4, 10', '112.7', '95.8', '9.8', 'Too dry'],
  ['T-0218', 'L9, 10', '121.9', '103.7', '16.1', 'Suspect'],
  ['T-0142-R1', 'E6, 8', '114.0', '96.9', '12.1', 'Meets spec'],
  ['T-0142', 'E6, 8', '109.1', '92.8', '11.7', 'Too loose'],
] as const

const FACTS = [
  { label: 'Dry unit wt', value: '112.7', unit: 'pcf' },
  { label: 'Compaction', value: '95.8', unit: '%' },
  { label: 'Moisture', value: '9.8', unit: '%', tone: 'bad' },
  { label: 'Saturation', value: '54', unit: '%' },
] as const

function CoveredQuestion() {
  const [open, setOpen] = useState(false)
  return (
    <>
      <Button onClick={() => setOpen(true)}>Place fill</Button>
      <Question
        open={open}
        onOpenChange={setOpen}
        title="12 of these cells sit on ground that is not released"
        consequence="Lift 9 in N4 to P7 still waits for 1 test. Placing now marks it covered too early, and everything above it stays in doubt until it is dealt with."
        actions={
          <>
            <QuestionCancel>
              <Button kind="primary">Leave them out</Button>
            </QuestionCancel>
            <Button kind="danger" onClick={() => setOpen(false)}>
              Place anyway, with reason
            </Button>
          </>
        }
      />
    </>
  )
}

export function GalleryWords() {
  const [tab, setTab] = useState('mine')
  return (
    <GalleryColumn>
      <GalleryPart title="Banners">
        <div className="grid gap-[10px]">
          <Banner tone="off" title="No signal since 14:06." action={<a href="#main">Show</a>}>
            3 results are kept on this phone and will be sent.
          </Banner>
          <Banner tone="bad" title="The database does not answer.">
            Nothing is lost, trying again.
          </Banner>
          <Banner title="T-0219 saved." action={<a href="#main">Open R-016</a>}>
            9 cells went to rework.
          </Banner>
        </div>
      </GalleryPart>
      <GalleryPart title="A question before something that can't be taken back">
        <div className="flex flex-wrap gap-2">
          <CoveredQuestion />
          <Popover label="Why" trigger={<Button kind="quiet">Why</Button>}>
            <p className="m-0 max-w-64">The ground below still waits for its test.</p>
          </Popover>
        </div>
      </GalleryPart>
      <GalleryPart title="Registers">
        <Table caption="Tests of today">
          <thead>
            <tr>
              <HeadCell>Test</HeadCell>
              <HeadCell>Cell, lift</HeadCell>
              <HeadCell numeric>Dry pcf</HeadCell>
              <HeadCell numeric>RC %</HeadCell>
              <HeadCell numeric>w %</HeadCell>
              <HeadCell>Result</HeadCell>
            </tr>
          </thead>
          <tbody>
            {TESTS.map(([number, place, dry, rc, moisture, result]) => (
              <Row key={number} selected={number === 'T-0218'}>
                <RowHead>{number}</RowHead>
                <Cell>{place}</Cell>
                <Cell numeric>{dry}</Cell>
                <Cell numeric>{rc}</Cell>
                <Cell numeric>{moisture}</Cell>
                <Cell>{result}</Cell>
              </Row>
            ))}
          </tbody>
        </Table>
      </GalleryPart>
      <GalleryPart title="A figure and what it is of">
        <Figure value="3,410" unit="cy" of="92 cells, about 213 loads" />
        <FactsRow facts={FACTS} className="mt-4" />
      </GalleryPart>
      <GalleryPart title="Views">
        <Tabs
          label="Rework"
          value={tab}
          onChange={setTab}
          tabs={[
            { value: 'mine', label: 'My rework', count: 2, content: 'R-014 and R-015 wait for you.' },
            { value: 'keep-off', label: 'Keep off', count: 3, content: 'Three areas wait for a test.' },
            { value: 'ready', label: 'Ready', content: 'Nothing is ready for retest.' },
          ]}
        />
      </GalleryPart>
    </GalleryColumn>
  )
}
