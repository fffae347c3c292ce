import { Component, type ReactNode } from 'react';

interface ChartBoundaryProps {
  readonly fallback: ReactNode;
  readonly children: ReactNode;
}

/** A plot that fails takes only its own place: the numbers stay on screen. */
export class ChartBoundary extends Component<ChartBoundaryProps, { hasFailed: boolean }> {
  override state = { hasFailed: false };

  static getDerivedStateFromError() {
    return { hasFailed: true };
  }

  override render() {
    return this.state.hasFailed ? this.props.fallback : this.props.children;
  }
}
