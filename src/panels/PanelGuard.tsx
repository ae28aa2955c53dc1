import { Component, type ReactNode } from 'react'

/** Keeps the rest of the page standing when a panel cannot be shown, and says so. */
export class PanelGuard extends Component<{ children: ReactNode }, { failed: boolean }> {
  override state = { failed: false }

  static getDerivedStateFromError(): { failed: boolean } {
    return { failed: true }
  }

  override render(): ReactNode {
    if (!this.state.failed) return this.props.children
    return (
      <p className="wrong-text" role="alert">
        This panel could not be opened: part of the page did not load, or met a fault. The design is
        safe; save it as a file and reload the page.
      </p>
    )
  }
}
