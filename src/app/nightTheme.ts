import { useSyncExternalStore } from 'react'

const KEY = 'breathmark.theme'
const listeners = new Set<() => void>()

/** Night is for a ward with the lights out: chosen by hand, kept on this device, never guessed. */
export function applyKeptTheme(): void {
  show(localStorage.getItem(KEY) === 'night')
}

export function useNightTheme(): readonly [boolean, (night: boolean) => void] {
  const night = useSyncExternalStore(subscribe, isNight)
  return [night, choose]
}

function choose(night: boolean): void {
  localStorage.setItem(KEY, night ? 'night' : 'light')
  show(night)
  for (const listener of listeners) listener()
}

function show(night: boolean): void {
  if (night) document.documentElement.dataset.theme = 'night'
  else delete document.documentElement.dataset.theme
}

function isNight(): boolean {
  return document.documentElement.dataset.theme === 'night'
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener)
  return () => listeners.delete(listener)
}
