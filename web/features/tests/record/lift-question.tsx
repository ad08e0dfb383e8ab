import { Button } from '#web/components/ui/button.tsx'
import { Question, QuestionCancel } from '#web/components/ui/dialog.tsx'
import type { Saving } from './use-saving.ts'

function titleOf(found: number | null, lift: number): string {
  if (found === null) return `This elevation lies above the planned fill, not in lift ${lift}`
  return found === 0 ? `This elevation lies in the foundation, not in lift ${lift}` : `This elevation lies in lift ${found}, not ${lift}`
}

/** Asked where elevation and lift disagree: the person decides, never the sheet. */
export function LiftQuestion({ saving, lift }: { saving: Saving; lift: number }) {
  const found = saving.question?.lift ?? null
  return (
    <Question
      open={saving.question !== null}
      onOpenChange={(open) => {
        if (!open) saving.closeQuestion()
      }}
      title={titleOf(found, lift)}
      consequence="The lift decides which lot the test counts in. Nothing is saved yet, and everything typed is kept."
      actions={
        <>
          {found !== null && found > 0 ? (
            <Button kind="primary" size="touch" onClick={() => saving.useLift(found)}>
              Use lift {found}
            </Button>
          ) : (
            <QuestionCancel>
              <Button kind="primary" size="touch">
                Correct the elevation
              </Button>
            </QuestionCancel>
          )}
          <Button size="touch" onClick={saving.keepLift}>
            Keep lift {lift}, flagged
          </Button>
        </>
      }
    />
  )
}
