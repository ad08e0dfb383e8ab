import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { useState } from 'react'
import { describe, expect, it, vi } from 'vitest'
import { Button } from '#web/components/ui/button.tsx'
import { Question, QuestionCancel } from '#web/components/ui/dialog.tsx'
import { Segmented } from '#web/components/ui/segmented.tsx'

function Asking({ onPlace }: { onPlace: () => void }) {
  const [open, setOpen] = useState(false)
  return (
    <>
      <Button onClick={() => setOpen(true)}>Place fill</Button>
      <Question
        open={open}
        onOpenChange={setOpen}
        title="12 of these cells sit on ground that is not released"
        consequence="Everything above stays in doubt."
        actions={
          <>
            <QuestionCancel>
              <Button kind="primary">Leave them out</Button>
            </QuestionCancel>
            <Button kind="danger" onClick={onPlace}>
              Place anyway
            </Button>
          </>
        }
      />
    </>
  )
}

describe('a question before something that cannot be taken back', () => {
  it('opens by keyboard on its safe answer and names itself', async () => {
    render(<Asking onPlace={vi.fn()} />)
    await userEvent.tab()
    await userEvent.keyboard('{Enter}')
    const dialog = screen.getByRole('alertdialog', { name: '12 of these cells sit on ground that is not released' })
    expect(dialog.textContent).toContain('Everything above stays in doubt.')
    expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Leave them out' }))
  })

  it('leaves everything as it was on Escape and gives the focus back', async () => {
    const onPlace = vi.fn()
    render(<Asking onPlace={onPlace} />)
    const opener = screen.getByRole('button', { name: 'Place fill' })
    opener.focus()
    await userEvent.keyboard('{Enter}')
    await userEvent.keyboard('{Escape}')
    expect(screen.queryByRole('alertdialog')).toBeNull()
    expect(onPlace).not.toHaveBeenCalled()
    await vi.waitFor(() => expect(document.activeElement).toBe(opener))
  })

  it('keeps the focus inside while it is open', async () => {
    render(<Asking onPlace={vi.fn()} />)
    await userEvent.click(screen.getByRole('button', { name: 'Place fill' }))
    await userEvent.tab()
    expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Place anyway' }))
    await userEvent.tab()
    expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Leave them out' }))
  })
})

describe('a button on its way', () => {
  it('says so and cannot be pressed again', async () => {
    const onClick = vi.fn()
    render(<Button busyLabel="Saving" onClick={onClick}>Save</Button>)
    const button = screen.getByRole('button', { name: 'Saving' })
    await userEvent.click(button)
    expect(button.getAttribute('aria-busy')).toBe('true')
    expect(onClick).not.toHaveBeenCalled()
  })
})

describe('one choice out of a few', () => {
  it('is one group of radio buttons, so that the browser’s own arrow keys move it', async () => {
    const onChange = vi.fn()
    render(<Segmented label="Method" value="cone" onChange={onChange} options={[{ value: 'cone', label: 'Sand cone' }, { value: 'gauge', label: 'Nuclear gauge' }]} />)
    const names = screen.getAllByRole<HTMLInputElement>('radio').map((radio) => radio.name)
    expect(new Set(names).size).toBe(1)
    expect(screen.getByRole<HTMLInputElement>('radio', { name: 'Sand cone' }).checked).toBe(true)
    await userEvent.click(screen.getByRole('radio', { name: 'Nuclear gauge' }))
    expect(onChange).toHaveBeenCalledWith('gauge')
  })
})
