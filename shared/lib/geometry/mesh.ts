/**
 * A triangle mesh with shared vertices.
 * `positions` holds x, y, z of each vertex, `faces` three indices a triangle, anticlockwise seen from outside. Lengths are in
 * whatever unit the file meant: an STL does not say.
 */
export interface Mesh {
  readonly positions: Float32Array | Float64Array
  readonly faces: Uint32Array
}
