import type { ModelFacts } from '../../shared/api/files'
import type { StlRefusal } from '../../shared/lib/geometry/stl'

/**
 * What the mesh functions take and give. They run in a worker thread: files go in and come out by path, so that nothing large is
 * copied between threads. All lengths are in the file's own unit, which an STL does not name; the designer is asked for it.
 */
export interface AnalyseRequest {
  /** The STL, as stored. */
  file: string
  /** A folder that exists; the files made are written into it under the names of `MadeFile`. */
  outDir: string
  /** More triangles than this are refused before they are read into memory. Default 5,000,000. */
  mostFacets?: number
}

/** A file that was written into `outDir`. `name` is the rendition's name in shared/api/files. */
export interface MadeFile {
  name: 'glb' | 'still' | 'still-png'
  file: string
  mediaType: 'model/gltf-binary' | 'image/svg+xml' | 'image/png'
  bytes: number
  width: number | null
  height: number | null
}

/** A refused file is an ordinary outcome: `why` names it for the program, `sentence` says it to the designer. */
export type AnalyseOutcome =
  { ok: true; facts: ModelFacts; made: MadeFile[] } | { ok: false; why: StlRefusal['why']; sentence: string }

/** A picture in lines: paths for an SVG of this size, and where the named points came to lie. */
export interface LineDrawing {
  width: number
  height: number
  /** The four weights of the drawing office; a weight without lines is an empty string. Path data for the attribute `d`. */
  paths: { outline: string; part: string; thin: string; chain: string }
  /** In hundredths of a per cent of width and height from the upper left corner, as a document's `Place`. */
  anchors: Record<string, { x: number; y: number }>
  /** For each anchor a free place beside the drawing where its balloon can stand without covering a line. */
  balloons: Record<string, { x: number; y: number }>
}
