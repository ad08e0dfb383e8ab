import { useRef } from 'react'

/**
 * Gives the focus back to whatever had it before a dialog opened. Radix does so only for a dialog with its own
 * trigger; ours are opened from state.
 */
export function useFocusReturn() {
  const opener = useRef<HTMLElement | null>(null)
  return {
    onOpenAutoFocus: () => {
      opener.current = document.activeElement instanceof HTMLElement ? document.activeElement : null
    },
    onCloseAutoFocus: (event: Event) => {
      event.preventDefault()
      opener.current?.focus()
    },
  }
}
