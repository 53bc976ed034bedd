import { createRoot } from 'react-dom/client'
import { ModelViewer, type ModelViewerProps } from './ModelViewer'

/**
 * Puts the 3D view into an element of a page that has no application running. Import it when it is asked for:
 * `const { mountViewer } = await import('../viewer3d/mountViewer')`. Gives back what takes it away again.
 */
export function mountViewer(element: HTMLElement, props: ModelViewerProps): () => void {
  const root = createRoot(element)
  root.render(<ModelViewer {...props} />)
  return () => root.unmount()
}
