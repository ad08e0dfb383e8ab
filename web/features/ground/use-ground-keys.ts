import { useEffect, useEffectEvent } from 'react'

export type GroundKey = 'cut-up' | 'cut-down' | 'open' | 'leave' | 'list' | 'toggle' | 'help'

const KEYS: Readonly<Record<string, GroundKey>> = {
  ']': 'cut-up',
  '[': 'cut-down',
  Enter: 'open',
  Escape: 'leave',
  l: 'list',
  L: 'list',
  ' ': 'toggle',
  '?': 'help',
}

/** Keys that controls use themselves count only on the map or with nothing focused. */
const OF_THE_MAP: readonly GroundKey[] = ['open', 'toggle']

function isTyping(target: HTMLElement): boolean {
  return target.isContentEditable || /^(INPUT|TEXTAREA|SELECT)$/.test(target.tagName)
}

/** What a key press asks of the Ground; undefined when it belongs to a field, a dialog or the browser. */
export function groundKey(event: Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'altKey' | 'defaultPrevented'>, target: HTMLElement): GroundKey | undefined {
  if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey) return undefined
  if (target.closest('[role="dialog"], [role="alertdialog"], [role="menu"]') !== null) return undefined
  const key = KEYS[event.key]
  if (key === undefined) return undefined
  // a radio of the rail is an input that takes no letters
  const radio = target instanceof HTMLInputElement && target.type === 'radio'
  if (isTyping(target) && !radio && key !== 'leave') return undefined
  if (OF_THE_MAP.includes(key) && target.tagName !== 'CANVAS' && target.tagName !== 'BODY') return undefined
  return key
}

/** Hears the keys of the Ground wherever the focus is on its page. */
export function useGroundKeys(onKey: (key: GroundKey) => void): void {
  const handle = useEffectEvent((event: KeyboardEvent): void => {
    if (!(event.target instanceof HTMLElement)) return
    const key = groundKey(event, event.target)
    if (key === undefined) return
    if (key !== 'leave') event.preventDefault()
    onKey(key)
  })
  useEffect(() => {
    const listener = (event: KeyboardEvent): void => handle(event)
    window.addEventListener('keydown', listener)
    return () => window.removeEventListener('keydown', listener)
  }, [])
}
