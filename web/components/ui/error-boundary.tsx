import { Component, type ReactNode } from 'react'
import { Banner } from './banner.tsx'

type ErrorBoundaryProps = {
  /** What stopped, as it is called on the screen: "The map", "The plot". */
  what: string
  children: ReactNode
}

/** Keeps a part that stops from taking its page with it. */
export class ErrorBoundary extends Component<ErrorBoundaryProps, { stopped: boolean }> {
  override state = { stopped: false }

  static getDerivedStateFromError(): { stopped: boolean } {
    return { stopped: true }
  }

  override render(): ReactNode {
    if (!this.state.stopped) return this.props.children
    return (
      <Banner
        tone="bad"
        title={`${this.props.what} has stopped.`}
        action={
          <button type="button" onClick={() => this.setState({ stopped: false })}>
            Draw it again
          </button>
        }
      >
        The rest of the page works on. Nothing saved is lost.
      </Banner>
    )
  }
}
