import { useCallback, useMemo } from 'react'
import { useSearchParams } from 'react-router-dom'
import type { ViewContent } from '#shared/schemas/saved-view.ts'
import type { RegisterSort, TestFilter } from '#shared/schemas/test-register.ts'
import { NO_VIEW, readRegister, USUAL_COLUMNS, writeRegister, type RegisterAddress } from './register-address.ts'

export interface RegisterControls {
  readonly address: RegisterAddress
  /** parts of the filter; undefined takes one away. Goes back to the first page. */
  readonly narrow: (change: { readonly [K in keyof TestFilter]: TestFilter[K] | undefined }) => void
  readonly sortBy: (sort: RegisterSort) => void
  readonly show: (columns: RegisterAddress['columns']) => void
  readonly turnTo: (page: number) => void
  readonly clear: () => void
  /** everything as a view keeps it; null for the register as it comes */
  readonly open: (view: { readonly id: string; readonly content: ViewContent } | null, replace?: boolean) => void
}

/** What the register shows, kept in the page's address so that it can be shared and gone back to. */
export function useRegister(): RegisterControls {
  const [search, setSearch] = useSearchParams()
  const address = useMemo(() => readRegister(search), [search])
  const change = useCallback(
    (next: (before: RegisterAddress) => RegisterAddress, replace = true) => setSearch((before) => writeRegister(next(readRegister(before))), { replace }),
    [setSearch],
  )
  const narrow = useCallback<RegisterControls['narrow']>((part) => change((before) => ({ ...before, filter: { ...before.filter, ...part }, page: 1, view: before.view ?? NO_VIEW })), [change])
  const sortBy = useCallback((sort: RegisterSort) => change((before) => ({ ...before, sort, page: 1, view: before.view ?? NO_VIEW })), [change])
  const show = useCallback((columns: RegisterAddress['columns']) => change((before) => ({ ...before, columns, view: before.view ?? NO_VIEW })), [change])
  const turnTo = useCallback((page: number) => change((before) => ({ ...before, page, view: before.view ?? NO_VIEW }), false), [change])
  const clear = useCallback(() => change((before) => ({ ...before, filter: {}, page: 1, view: before.view ?? NO_VIEW })), [change])
  const open = useCallback<RegisterControls['open']>(
    (view, replace = false) => change((before) => (view === null ? { ...before, filter: {}, sort: readRegister(new URLSearchParams()).sort, columns: USUAL_COLUMNS, page: 1, view: NO_VIEW } : { ...view.content, page: 1, view: view.id }), replace),
    [change],
  )
  return useMemo(() => ({ address, narrow, sortBy, show, turnTo, clear, open }), [address, narrow, sortBy, show, turnTo, clear, open])
}
