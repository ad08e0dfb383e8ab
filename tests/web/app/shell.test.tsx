import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { MemoryRouter } from 'react-router-dom'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { initialsOf } from '#web/app/shell-user-menu.tsx'
import { Shell } from '#web/app/shell.tsx'
import { startTheme } from '#web/lib/theme.ts'

function openShell(onSignOut = vi.fn()) {
  render(
    <MemoryRouter initialEntries={['/sites/s1/ground']}>
      <Shell
        site={{ name: 'Alder Flats yard', subtitle: 'Phase 2 fill' }}
        nav={[
          { label: 'Ground', to: '/sites/s1/ground' },
          { label: 'Rework', to: '/sites/s1/rework', count: 2, countOf: 'open orders' },
        ]}
        connection={{ state: 'offline', since: '14:06' }}
        user={{ name: 'Rosa Okafor', role: 'Superintendent' }}
        onSignOut={onSignOut}
      >
        <h1>Ground</h1>
      </Shell>
    </MemoryRouter>,
  )
  return onSignOut
}

beforeEach(() => {
  localStorage.clear()
  startTheme()
})

describe('the shell', () => {
  it('says where one is, what waits and since when it is offline', () => {
    openShell()
    expect(screen.getByRole('link', { name: 'Ground' }).getAttribute('aria-current')).toBe('page')
    expect(screen.getByRole('link', { name: 'Rework 2 open orders' }).getAttribute('aria-current')).toBeNull()
    expect(screen.getByText('Offline since 14:06').textContent).toBe('Offline since 14:06')
  })

  it('signs out from the menu by keyboard', async () => {
    const onSignOut = openShell()
    screen.getByRole('button', { name: /Menu, Rosa Okafor/ }).focus()
    await userEvent.keyboard('{Enter}')
    await userEvent.keyboard('{End}{Enter}')
    expect(onSignOut).toHaveBeenCalledOnce()
  })

  it('turns the page dark for the night and remembers it', async () => {
    openShell()
    await userEvent.click(screen.getByRole('button', { name: /Menu, Rosa Okafor/ }))
    await userEvent.click(screen.getByRole('menuitemradio', { name: 'Dark, for night' }))
    expect(document.documentElement.dataset.theme).toBe('dark')
    startTheme()
    expect(document.documentElement.dataset.theme).toBe('dark')
  })

  it.each([
    ['Rosa Okafor', 'RO'],
    ['Ana María de la Vega', 'AV'],
    ['Plato', 'P'],
  ])('shortens %s to %s', (name, initials) => {
    expect(initialsOf(name)).toBe(initials)
  })
})
