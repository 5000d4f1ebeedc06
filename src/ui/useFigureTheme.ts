import { useSyncExternalStore } from 'react'
import { type FigureTheme, figureThemes } from '#shared/figures/figureTheme.ts'

/** The colours of figures that go with the page as it is shown now. */
export function useFigureTheme(): FigureTheme {
  return useSyncExternalStore(subscribe, isNight) ? figureThemes.night : figureThemes.light
}

function isNight(): boolean {
  return document.documentElement.dataset.theme === 'night'
}

function subscribe(listener: () => void): () => void {
  const observer = new MutationObserver(listener)
  observer.observe(document.documentElement, { attributeFilter: ['data-theme'] })
  return () => observer.disconnect()
}
