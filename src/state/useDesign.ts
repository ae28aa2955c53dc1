import { useStore } from 'zustand'
import { createDesignStore, type DesignState } from './designStore'

/** The design of this page. */
export const designStore = createDesignStore()

/**
 * One part of the state for a component, which is drawn again when that part is another. Select
 * what is there already: a new object built in `select` would be another each time, for ever.
 */
export function useDesign<T>(select: (state: DesignState) => T): T {
  return useStore(designStore, select)
}
