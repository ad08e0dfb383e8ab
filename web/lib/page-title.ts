import { useEffect } from 'react'

/** Names the page in the tab: "Cell L8 · Hardpan". */
export function usePageTitle(title: string): void {
  useEffect(() => {
    document.title = title === '' ? 'Hardpan' : `${title} · Hardpan`
  }, [title])
}
