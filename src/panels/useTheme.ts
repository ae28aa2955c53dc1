import { useEffect } from 'react'
import { look, type Theme, useView } from '../state/viewStore'

const key = 'glowloop.theme'

/** Puts the chosen theme on the page and keeps it for the next visit. */
export function useTheme(): void {
  const theme = useView((view) => view.theme)
  useEffect(() => {
    try {
      const kept = localStorage.getItem(key)
      if (kept === 'light' || kept === 'dark') look({ theme: kept satisfies Theme })
    } catch {
      // Without storage the page follows the system.
    }
  }, [])
  useEffect(() => {
    document.documentElement.dataset.theme = theme
    try {
      if (theme === 'system') localStorage.removeItem(key)
      else localStorage.setItem(key, theme)
    } catch {
      // Not kept, then.
    }
  }, [theme])
}
