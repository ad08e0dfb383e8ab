import { useSyncExternalStore } from 'react'
import type { Theme } from '#shared/look/theme.ts'

export const THEME_CHOICES = ['device', 'light', 'dark'] as const
export type ThemeChoice = (typeof THEME_CHOICES)[number]

const STORAGE_KEY = 'hardpan.theme'
const listeners = new Set<() => void>()
const darkQuery = (): MediaQueryList | null =>
  typeof window.matchMedia === 'function' ? window.matchMedia('(prefers-color-scheme: dark)') : null

function readChoice(): ThemeChoice {
  const stored = localStorage.getItem(STORAGE_KEY)
  return THEME_CHOICES.find((choice) => choice === stored) ?? 'device'
}

function currentTheme(): Theme {
  const choice = readChoice()
  if (choice !== 'device') return choice
  return darkQuery()?.matches === true ? 'dark' : 'light'
}

function announce(): void {
  document.documentElement.dataset.theme = currentTheme()
  for (const listener of listeners) listener()
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener)
  return () => listeners.delete(listener)
}

/** Marks the document with its theme and follows the device; called once, before the first render. */
export function startTheme(): void {
  announce()
  darkQuery()?.addEventListener('change', announce)
}

export function chooseTheme(choice: ThemeChoice): void {
  localStorage.setItem(STORAGE_KEY, choice)
  announce()
}

/** The theme on screen; the drawing layer needs it because it cannot read CSS. */
export function useTheme(): Theme {
  return useSyncExternalStore(subscribe, currentTheme)
}

export function useThemeChoice(): ThemeChoice {
  return useSyncExternalStore(subscribe, readChoice)
}
