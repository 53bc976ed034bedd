/** What the server hands to the renderer of a reading page, and what it gets back. Grows with the pages. */
export interface PageRequest {
  page: string
  data: unknown
  /** Language of the interface. */
  language: string
  path: string
}

export interface RenderedPage {
  html: string
}

export type RenderPage = (request: PageRequest) => RenderedPage
