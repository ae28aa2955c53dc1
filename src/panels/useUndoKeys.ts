import { useEffect } from 'react'
import { designStore } from '../state/useDesign'

/** Ctrl or Cmd with Z and Y, except where text is being typed: there the browser undoes the typing. */
export function useUndoKeys(): void {
  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey) return
      const target = event.target
      if (
        target instanceof HTMLElement &&
        target.matches('[data-typing], .title, #lamp-name, #design-note, #lamp-note')
      )
        return
      const key = event.key.toLowerCase()
      const again = key === 'y' || (key === 'z' && event.shiftKey)
      if (key !== 'z' && key !== 'y') return
      event.preventDefault()
      const { undo, redo } = designStore.getState()
      if (again) redo()
      else undo()
    }
    window.addEventListener('keydown', press)
    return () => window.removeEventListener('keydown', press)
  }, [])
}
