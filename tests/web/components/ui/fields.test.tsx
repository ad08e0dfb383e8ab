import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it } from 'vitest'
import { CalculatedField, CellsField, NumberField, SelectField } from '#web/components/ui/text-fields.tsx'

describe('a field', () => {
  it('is found by its label and said with its unit', () => {
    render(<NumberField label="Moist soil from hole" unit="g" />)
    expect(screen.getByRole('textbox', { name: 'Moist soil from hole' }).getAttribute('inputmode')).toBe('decimal')
    expect(screen.getByRole('textbox', { description: 'g' })).toBe(screen.getByLabelText('Moist soil from hole'))
  })

  it('says an error as part of the control and at once', () => {
    render(<NumberField label="Dry soil and tin" unit="g" error="Dry is heavier than wet (412.6 g)." />)
    const control = screen.getByRole('textbox', { name: 'Dry soil and tin', description: 'g Dry is heavier than wet (412.6 g).' })
    expect(control.getAttribute('aria-invalid')).toBe('true')
    expect(screen.getByRole('alert').textContent).toBe('Dry is heavier than wet (412.6 g).')
  })

  it('says a warning without calling the value invalid', () => {
    render(<NumberField label="Hole volume" warning="Small for the largest particle. You may save it, flagged." />)
    const control = screen.getByRole('textbox', { description: 'Small for the largest particle. You may save it, flagged.' })
    expect(control.getAttribute('aria-invalid')).toBeNull()
    expect(screen.queryByRole('alert')).toBeNull()
  })

  it('says the error rather than the warning when it has both', () => {
    render(<NumberField label="Tin" error="A tin weighs something." warning="Light for a tin." />)
    expect(screen.getByRole('alert').textContent).toBe('A tin weighs something.')
    expect(screen.queryByText('Light for a tin.')).toBeNull()
  })

  it('keeps a figure as it is typed', async () => {
    render(<NumberField label="Compaction" unit="%" />)
    await userEvent.type(screen.getByLabelText('Compaction'), '95.0')
    expect(screen.getByLabelText<HTMLInputElement>('Compaction').value).toBe('95.0')
  })

  it('says what typed cells come to', () => {
    render(<CellsField label="Cells" defaultValue="G11:I13, K12" comesTo="10 cells, 618 cy" />)
    expect(screen.getByRole('textbox', { name: 'Cells', description: '10 cells, 618 cy' }).getAttribute('spellcheck')).toBe('false')
  })

  it('shows a calculated figure that cannot be typed in, and says when there is none yet', () => {
    render(
      <>
        <CalculatedField label="Maximum" value="117.6" unit="pcf" />
        <CalculatedField label="Optimum" value={null} unit="%" />
      </>,
    )
    expect(screen.queryByRole('textbox')).toBeNull()
    expect(screen.getAllByRole('status').map((output) => output.textContent)).toEqual(['117.6', 'not yet'])
  })

  it('chooses from a list by its words', async () => {
    render(
      <SelectField label="Curve">
        <option value="a">RB-3</option>
        <option value="b">RB-4</option>
      </SelectField>,
    )
    await userEvent.selectOptions(screen.getByRole('combobox', { name: 'Curve' }), 'RB-4')
    expect(screen.getByLabelText<HTMLSelectElement>('Curve').value).toBe('b')
  })
})
