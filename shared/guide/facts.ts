/** What readiness asks of a model's measures. Counts of edges and facets, as the analysis of the mesh found them. */
export interface SolidFacts {
  closed: boolean
  openEdges: number
  backwardsEdges: number
  nonManifoldEdges: number
  degenerateFacets: number
}

/** What is known of a file beside the document. `model` is null for pictures and until a model has been measured. */
export interface FileFacts {
  kind: 'picture' | 'model'
  state: 'working' | 'ready' | 'failed'
  name: string
  trouble: string | null
  model: SolidFacts | null
}

/** What readiness knows beside the document: each file by its SHA-256. A file that is not there is not on the site. */
export interface Facts {
  files: ReadonlyMap<string, FileFacts>
}
